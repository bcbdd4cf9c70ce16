import { useId } from 'preact/hooks';
import { readMaturity } from '../input/dates';
import { readNumber } from '../input/quantities';
import { formatNumber, formatLongDate, precisionOf } from '../format';
import type { QuoteResult } from '../model/answer';
import type { AgreedRow } from '../model/draft';
import { nextId } from '../model/draft';
import { buildQuote } from '../model/build';
import { format } from '../model/view';
import { coreVersion } from '../store/signals';
import { draft, editDraft } from '../store/session';
import { useAnswer } from '../store/use-answer';
import { Cautions } from '../shell/cautions';
import { TextInput, type FieldKind } from '../fields/text-input';

interface CellProps {
  readonly name: string;
  readonly row: AgreedRow;
  readonly index: number;
  readonly member: 'reference' | 'price' | 'quantity' | 'maturity';
  readonly kind: FieldKind;
  readonly size: number;
}

function Cell({ name, row, index, member, kind, size }: CellProps) {
  const id = useId();
  return (
    <td>
      <TextInput
        id={id}
        name={`Forward ${index + 1}, ${name}`}
        binding={{
          path: `agreed/${index}/${member}`,
          text: row[member],
          set: (text) => editDraft(`agreed/${index}/${member}`, text),
        }}
        at={`/agreed/${index}/${member}`}
        kind={kind}
        size={size}
      />
    </td>
  );
}

/** What today's market says of a forward agreed earlier: the same forward, fair today. */
function Today({ row }: { readonly row: AgreedRow }) {
  const { decimal, locale } = format.value;
  const deal = draft.value.deals[row.market];
  const made = deal === undefined ? null : buildQuote(deal, { sign: decimal, locale });
  const asOf = made?.request.market.asOf ?? '';
  const maturity = row.maturity.trim() === '' ? null : readMaturity(row.maturity, { locale, after: asOf });
  const quantity = readNumber(row.quantity, 'amount', decimal);
  const price = row.price.trim() === '' ? null : readNumber(row.price, 'price', decimal);
  const ready = made !== null && maturity?.ok === true && coreVersion.value !== '';
  const { result, errors, stale } = useAnswer<QuoteResult>(
    ready
      ? {
          format: 'forwright/1',
          task: 'quote',
          market: made.request.market,
          inquiry: {
            client: row.client === 'bought' ? 'sells' : 'buys',
            quantity: quantity.ok ? quantity.value : 1,
            maturity: maturity.value,
          },
          want: [],
        }
      : null,
  );
  const wrong =
    (maturity !== null && !maturity.ok && maturity.message) ||
    (price !== null && !price.ok && price.message) ||
    (row.quantity.trim() !== '' && !quantity.ok && quantity.message) ||
    (stale && errors[0]?.message);
  if (typeof wrong === 'string')
    return (
      <td colSpan={3} class="row-error">
        {wrong}
      </td>
    );
  if (result === null || !ready) return <td colSpan={3} class="muted" />;
  const { between } = precisionOf(made.request.market.asset.tick, result.fair);
  const ending = row.client === 'bought' ? result.breakEven.bid : result.breakEven.offer;
  return (
    <>
      <td class="num strong">{formatNumber(result.fair, between)}</td>
      <td class="num">{formatNumber(ending, between)}</td>
      <td class="date">{formatLongDate(result.dates.settlement)}</td>
    </>
  );
}

function AgreedLine({ row, index }: { readonly row: AgreedRow; readonly index: number }) {
  const { deals, agreed } = draft.value;
  const set = (member: string, value: string): void => editDraft(`agreed/${index}/${member}`, value);
  return (
    <tr>
      <Cell name="reference" member="reference" kind="text" size={8} row={row} index={index} />
      <td>
        <select
          aria-label={`Forward ${index + 1}, asset`}
          value={row.market}
          onChange={(event) => set('market', event.currentTarget.value)}
        >
          {Object.entries(deals).map(([id, { market }]) => (
            <option key={id} value={id}>
              {market.asset.name.trim() || id}
            </option>
          ))}
        </select>
      </td>
      <td>
        <select
          aria-label={`Forward ${index + 1}, the client`}
          value={row.client}
          onChange={(event) => set('client', event.currentTarget.value)}
        >
          <option value="bought">bought</option>
          <option value="sold">sold</option>
        </select>
      </td>
      <Cell name="quantity" member="quantity" kind="amount" size={8} row={row} index={index} />
      <Cell name="price agreed" member="price" kind="price" size={8} row={row} index={index} />
      <Cell name="maturity" member="maturity" kind="maturity" size={10} row={row} index={index} />
      <Today row={row} />
      <td>
        <button
          type="button"
          class="quiet remove"
          aria-label={`Take out forward ${index + 1}`}
          onClick={() =>
            editDraft(
              'agreed',
              agreed.filter((other) => other.id !== row.id),
            )
          }
        >
          ×
        </button>
      </td>
    </tr>
  );
}

/** Forwards agreed earlier, each beside the same forward in today's market. */
export function AgreedPlace() {
  const { agreed, current } = draft.value;
  const add = (): void =>
    editDraft('agreed', [
      ...agreed,
      { id: nextId(agreed), market: current, reference: '', client: 'bought', price: '', quantity: '', maturity: '' },
    ]);
  return (
    <main class="place place-agreed" id="here">
      <section class="block">
        <h1>Forwards agreed</h1>
        <p class="muted">
          Each forward beside the same one in today’s market: what would be fair now, and the break-even at which it
          would be ended.
        </p>
        {agreed.length === 0 ? (
          <p>None is written down yet.</p>
        ) : (
          <div class="table-frame" tabIndex={0} role="region" aria-label="Forwards agreed">
            <table class="table rows">
              <thead>
                <tr>
                  <th scope="col">Reference</th>
                  <th scope="col">Asset</th>
                  <th scope="col">Client</th>
                  <th scope="col">Quantity</th>
                  <th scope="col">Agreed at</th>
                  <th scope="col">Maturity</th>
                  <th scope="col" class="num">
                    Fair today
                  </th>
                  <th scope="col" class="num">
                    Ends at
                  </th>
                  <th scope="col">Settles</th>
                  <th>
                    <span class="sr-only">Take out</span>
                  </th>
                </tr>
              </thead>
              <tbody>
                {agreed.map((row, index) => (
                  <AgreedLine key={row.id} row={row} index={index} />
                ))}
              </tbody>
            </table>
          </div>
        )}
        <div class="row">
          <button type="button" class="plain" onClick={add}>
            Write a forward down
          </button>
        </div>
        <Cautions />
      </section>
    </main>
  );
}
