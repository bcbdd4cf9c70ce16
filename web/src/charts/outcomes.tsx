import { scaleLinear } from 'd3-scale';
import { formatNumber } from '../format';
import { FigureFrame } from './figure-frame';
import { spread } from './spread';
import { textWidth } from './text-width';
import { useWidth } from './use-width';

const size = 13;
const top = 58;
const row = 34;

/** What is not exceeded with a probability. */
export interface OutcomeQuantile {
  readonly probability: number;
  readonly value: number;
}
/** A value to be seen against the outcomes; all but the first are drawn dashed. */
export interface OutcomeMark {
  readonly name: string;
  readonly value: number;
}

interface Range {
  readonly name: string;
  readonly low: number;
  readonly high: number;
}

/** The middle half, nine in ten, and all but two in a hundred of the outcomes. */
function ranges(quantiles: readonly OutcomeQuantile[]): Range[] {
  const valueAt = (probability: number) =>
    quantiles.find((quantile) => Math.abs(quantile.probability - probability) < 1e-9)?.value;
  return (
    [
      ['1 in 2', 0.25, 0.75],
      ['9 in 10', 0.05, 0.95],
      ['98 in 100', 0.01, 0.99],
    ] as const
  ).flatMap(([name, from, to]) => {
    const low = valueAt(from);
    const high = valueAt(to);
    return low === undefined || high === undefined ? [] : [{ name, low, high }];
  });
}

interface Props {
  readonly name: string;
  /** What the values are, as `Factor`. */
  readonly what: string;
  readonly quantiles: readonly OutcomeQuantile[];
  readonly marks: readonly OutcomeMark[];
  /** Decimals beside the ranges, and of the marks and the table. */
  readonly digits: number;
  readonly fineDigits: number;
}

function Table({ what, quantiles, fineDigits }: Props) {
  return (
    <table class="table">
      <thead>
        <tr>
          <th scope="col">Outcomes at or below</th>
          <th scope="col" class="num">
            {what}
          </th>
        </tr>
      </thead>
      <tbody>
        {quantiles.map(({ probability, value }) => (
          <tr key={probability}>
            <th scope="row">{formatNumber(probability * 100, 0)} %</th>
            <td class="num">{formatNumber(value, fineDigits)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** How far a random value may lie: three ranges that hold so many of the outcomes, with the marks that matter over them. */
export function Outcomes(props: Props) {
  const { name, quantiles, digits, fineDigits } = props;
  const [ref, width] = useWidth<HTMLDivElement>(640);
  const rows = ranges(quantiles);
  const marks = props.marks.map((mark, index) => ({ ...mark, dashed: index > 0 })).sort((a, b) => a.value - b.value);
  const values = [...rows.flatMap(({ low, high }) => [low, high]), ...marks.map(({ value }) => value)];
  const low = Math.min(...values);
  const high = Math.max(...values);
  const nameRoom = Math.max(0, ...rows.map(({ name }) => textWidth(name, size))) + 12;
  const valueRoom = Math.max(...[low, high].map((value) => textWidth(formatNumber(value, digits), size))) + 8;
  const x = scaleLinear()
    .domain(high > low ? [low, high] : [low - 0.001, low + 0.001])
    .range([nameRoom + valueRoom, width - valueRoom - 2]);
  const places = spread(
    marks.map((mark) => ({ at: x(mark.value), width: textWidth(mark.name, size, 650) })),
    nameRoom,
    width,
    14,
  );
  const height = top + rows.length * row;
  const words = [
    ...marks.map((mark) => `${mark.name} ${formatNumber(mark.value, fineDigits)}`),
    ...rows.map(
      (range) => `${range.name} between ${formatNumber(range.low, digits)} and ${formatNumber(range.high, digits)}`,
    ),
  ].join('; ');
  return (
    <FigureFrame name={name} table={<Table {...props} />}>
      <div ref={ref} class="chart-area" style={{ blockSize: `${height}px` }}>
        <svg width={width} height={height} role="img" aria-label={`${name}: ${words}.`}>
          {rows.map(({ name: share, low: from, high: to }, i) => {
            const middle = top + i * row + row / 2;
            return (
              <g key={share} class={`outcome outcome-${i}`}>
                <text class="text" x={0} y={middle + 4.5}>
                  {share}
                </text>
                <rect x={x(from)} y={middle - 8} width={Math.max(2, x(to) - x(from))} height={16} />
                <text class="text ink" x={x(from) - 6} y={middle + 4.5} text-anchor="end">
                  {formatNumber(from, digits)}
                </text>
                <text class="text ink" x={x(to) + 6} y={middle + 4.5}>
                  {formatNumber(to, digits)}
                </text>
              </g>
            );
          })}
          {marks.map(({ name: mark, value, dashed }, i) => (
            <g key={mark} class={`outcome-mark${dashed ? ' mark-dashed' : ''}`}>
              <polyline points={`${places[i] ?? 0},38 ${x(value)},50 ${x(value)},${height - 6}`} />
              <text class="text strong" x={places[i]} y={14} text-anchor="middle">
                {mark}
              </text>
              <text class="text ink" x={places[i]} y={31} text-anchor="middle">
                {formatNumber(value, fineDigits)}
              </text>
            </g>
          ))}
        </svg>
      </div>
    </FigureFrame>
  );
}
