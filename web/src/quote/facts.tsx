import { formatMoney, formatNumber, formatSigned, formatSignedMoney, formatSignedPercent } from '../format';
import type { Precision } from '../format';
import { previous } from '../model/view';
import type { ComparisonResult, QuoteRequest, QuoteResult, Side } from '../model/view';
import { useAnswer } from '../store/use-answer';
import { unitName } from './words';

interface Props {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
}

/** What dealing on one side means: what is bought or sold today against it, and the money it comes to. */
export function SideFacts({ request, result, side }: Props & { readonly side: Side }) {
  const { total } = result;
  const notional = total?.notional[side] ?? null;
  const hedge = total?.hedgeUnits[side] ?? null;
  if (notional === null || hedge === null) return <p class="side-facts" />;
  const act = hedge < 0 ? 'sell' : 'buy';
  return (
    <p class="side-facts">
      <span class="num">{formatMoney(notional, request.market.asset.currency)}</span>
      <span>
        <span class="when">hedge today: </span>
        {act} <span class="num">{formatNumber(Math.abs(hedge), 0)}</span> {unitName(request)}
      </span>
    </p>
  );
}

interface Fact {
  readonly name: string;
  readonly value: string;
  readonly more?: string;
}

function facts({ request, result }: Props, { between }: Precision): Fact[] {
  const { currency } = request.market.asset;
  const { total, carry } = result;
  const list: Fact[] = [
    { name: 'Points', value: formatSigned(carry.points, between), more: 'fair less spot' },
    { name: 'Carry', value: formatSignedPercent(result.annualised), more: 'a year' },
  ];
  if (total) {
    list.push(
      {
        name: 'Margin',
        value: formatMoney(total.margin, currency),
        more: `${formatNumber(result.margin, between)} a unit`,
      },
      { name: 'One basis point', value: formatSignedMoney(total.fundingBasisPoint, currency), more: 'funding up' },
      {
        name: 'One day',
        value: total.day === null ? 'none left' : formatSignedMoney(total.day, currency),
        more: 'a business day on',
      },
    );
  }
  return list;
}

interface SwitchedProps extends Props {
  readonly precision: Precision;
}

/** The change that switching funding made, until the next switch: the core's own comparison of the two. */
function Switched({ request, result, precision }: SwitchedProps) {
  const before = previous.value;
  const fundings =
    before === null
      ? []
      : [
          { name: before.was, curve: before.request.market.funding.curve },
          { name: before.now, curve: request.market.funding.curve },
        ];
  const { result: compared } = useAnswer<ComparisonResult>(
    before === null
      ? null
      : { format: 'forwright/1', task: 'compare', market: request.market, inquiry: request.inquiry, fundings },
  );
  if (!before) return null;
  const digits = precision.between + 2;
  const row = compared?.rows[1];
  return (
    <div>
      <dt>
        Fair since {before.was} became {before.now}
      </dt>
      <dd>
        <b class="num">{row === undefined ? formatNumber(result.fair, digits) : formatSigned(row.change, digits)}</b>{' '}
        <small class="num">
          was {formatNumber(before.result.fair, digits)}
          {row !== undefined && `, ${formatSignedMoney(row.onQuantity, request.market.asset.currency)}`}
        </small>
      </dd>
    </div>
  );
}

/** What belongs to both sides. */
export function Facts({ request, result, precision }: Props & { readonly precision: Precision }) {
  return (
    <dl class="facts">
      {facts({ request, result }, precision).map(({ name, value, more }) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>
            <b class="num">{value}</b> <small>{more}</small>
          </dd>
        </div>
      ))}
      <Switched request={request} result={result} precision={precision} />
    </dl>
  );
}
