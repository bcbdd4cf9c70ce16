import { useId } from 'preact/hooks';
import { formatDate, formatNumber, formatSigned, formatSignedPercent, precisionOf } from '../format';
import type { TenorsResult } from '../model/answer';
import { format } from '../model/view';
import { Elsewhere } from './elsewhere';
import { built } from '../store/calculation';
import { coreVersion } from '../store/signals';
import { draft, editDraft } from '../store/session';
import { useAnswer } from '../store/use-answer';
import { maturitiesOf, type Word } from './maturities';

function TenorsTable({ result, words, stale }: { result: TenorsResult; words: readonly Word[]; stale: boolean }) {
  const { tick } = built.value.request.market.asset;
  return (
    <div class="table-frame" tabIndex={0} role="region" aria-label="Prices by maturity" data-stale={stale}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">For</th>
            <th scope="col">Maturity</th>
            <th scope="col">Settles</th>
            <th scope="col" class="num">
              Our bid
            </th>
            <th scope="col" class="num">
              Our offer
            </th>
            <th scope="col" class="num">
              Fair
            </th>
            <th scope="col" class="num">
              Break-evens
            </th>
            <th scope="col" class="num">
              Points
            </th>
            <th scope="col" class="num">
              Carry a year
            </th>
          </tr>
        </thead>
        <tbody>
          {result.rows.map((row, index) => {
            const { dealt, between } = precisionOf(tick, row.fair);
            const price = (value: number | null): string => (value === null ? '–' : formatNumber(value, dealt));
            return (
              <tr key={`${index} ${row.maturity}`}>
                <th scope="row">{words[index]?.typed ?? ''}</th>
                <td class="date">{formatDate(row.maturity)}</td>
                <td class="date">{formatDate(row.settlement)}</td>
                <td class="num strong">{price(row.quote.bid)}</td>
                <td class="num strong">{price(row.quote.offer)}</td>
                <td class="num">{formatNumber(row.fair, between)}</td>
                <td class="num">
                  {formatNumber(row.breakEven.bid, between)} – {formatNumber(row.breakEven.offer, between)}
                </td>
                <td class="num">{formatSigned(row.points, between)}</td>
                <td class="num">{formatSignedPercent(row.annualised)}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

/** One inquiry at several maturities. */
export function Tenors() {
  const id = useId();
  const { request } = built.value;
  const { locale } = format.value;
  const text = draft.value.tenors.maturities;
  const words = maturitiesOf(text, locale, request.market.asOf);
  const { client, quantity, margin, roll } = request.inquiry;
  const question =
    words.length === 0 || coreVersion.value === ''
      ? null
      : {
          format: 'forwright/1',
          task: 'tenors',
          market: request.market,
          inquiry: { client, quantity, ...(margin === undefined ? {} : { margin }) },
          maturities: words.map((word) => word.maturity),
          ...(roll === undefined ? {} : { roll }),
        };
  const { result, errors: wrong, stale } = useAnswer<TenorsResult>(question);
  const own = wrong.filter((fault) => fault.at.startsWith('/maturities'));
  return (
    <>
      <div class="field">
        <label for={id}>Maturities: tenors apart by spaces, dates by commas</label>
        <textarea
          id={id}
          rows={2}
          spellcheck={false}
          value={text}
          aria-invalid={own.length > 0}
          aria-describedby={`${id}-errors`}
          onInput={(event) => editDraft('tenors/maturities', event.currentTarget.value)}
        />
        <div id={`${id}-errors`}>
          {own.map((fault) => (
            <p class="field-error" key={fault.at}>
              {words[Number(fault.at.split('/')[2])]?.typed}: {fault.message}
            </p>
          ))}
        </div>
      </div>
      {own.length === 0 && <Elsewhere apart={['/inquiry/maturity']} />}
      {result !== null && <TenorsTable result={result} words={words} stale={stale} />}
    </>
  );
}
