import { formatSigned, formatSignedMoney } from '../format';
import type { QuoteRequest, QuoteResult } from '../model/view';
import { pricePrecision } from '../quote/words';
import { placeName } from './names';

interface Line {
  readonly name: string;
  readonly move: string;
  readonly change: number;
  readonly onAll?: number;
  readonly part?: boolean;
}

type Curve = NonNullable<QuoteResult['sensitivities']>['funding'];

function curveLines(name: string, curve: Curve, request: QuoteRequest, onAll?: number): Line[] {
  return [
    { name, move: '1 bp up, every date', change: curve.parallel, ...(onAll === undefined ? {} : { onAll }) },
    ...(curve.pillars ?? []).map(({ at, change }) => ({
      name: placeName(request, at),
      move: '1 bp up',
      change,
      part: true,
    })),
    ...(curve.parameters ?? []).map(({ at, change }) => ({
      name: placeName(request, at),
      move: '0.0001 up',
      change,
      part: true,
    })),
  ];
}

function linesOf(request: QuoteRequest, { sensitivities, total }: QuoteResult): Line[] {
  if (!sensitivities) return [];
  const { spot, funding, base, fee, yield: yields, yieldCurve, cash, day } = sensitivities;
  const lines: Line[] = [{ name: 'Spot', move: '1 up', change: spot }];
  lines.push(...curveLines('Funding', funding, request, total?.fundingBasisPoint));
  if (base) lines.push(...curveLines(`${request.market.asset.base ?? 'Base'} funding`, base, request));
  if (request.market.asset.kind !== 'currency-pair') {
    lines.push({ name: 'Lending fee', move: '1 bp up', change: fee });
    if (yieldCurve) lines.push(...curveLines('Implied yield', yieldCurve, request));
    else lines.push({ name: 'Yield', move: '1 bp up', change: yields });
  }
  lines.push(...cash.map(({ at, change }) => ({ name: placeName(request, at), move: '1 up', change })));
  if (day !== null) {
    const onAll = total?.day ?? undefined;
    lines.push({ name: 'Time', move: 'a business day on', change: day, ...(onAll === undefined ? {} : { onAll }) });
  }
  return lines;
}

/** What moves the fair forward and by how much, one thing at a time. */
export function Sensitivities({ request, result }: { readonly request: QuoteRequest; readonly result: QuoteResult }) {
  const lines = linesOf(request, result);
  const digits = Math.min(7, pricePrecision(request, result).between + 4);
  const { currency } = request.market.asset;
  return (
    <>
      <div class="frame" role="region" aria-label="Sensitivities" tabIndex={0}>
        <table class="table sensitivities">
          <caption class="muted">Change of the fair forward when one thing moves and all else stays.</caption>
          <thead>
            <tr>
              <th scope="col">What moves</th>
              <th scope="col" class="num">
                {currency} a unit
              </th>
              <th scope="col" class="num">
                On the whole quantity
              </th>
            </tr>
          </thead>
          <tbody>
            {lines.map(({ name, move, change, onAll, part }, i) => (
              <tr key={i} class={part ? 'part-of' : undefined}>
                <th scope="row">
                  {name} <small>{move}</small>
                </th>
                <td class="num">{formatSigned(change, digits)}</td>
                <td class="num">{onAll === undefined ? '' : formatSignedMoney(onAll, currency)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {result.sensitivities?.day === null && <p class="muted">No business day is left before maturity.</p>}
    </>
  );
}
