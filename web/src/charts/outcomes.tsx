import { scaleLinear } from 'd3-scale';
import { formatNumber } from '../format';
import type { QuoteResult } from '../model/view';
import { FigureFrame } from './figure-frame';
import { spread } from './spread';
import { textWidth } from './text-width';
import { useWidth } from './use-width';

const size = 13;
const digits = 4;
const top = 58;
const row = 34;

type Block = NonNullable<QuoteResult['random']>;

interface Range {
  readonly name: string;
  readonly low: number;
  readonly high: number;
}

/** The middle half, nine in ten, and all but two in a hundred of the outcomes. */
function ranges({ quantiles }: Block): Range[] {
  const factorAt = (probability: number) =>
    quantiles.find((quantile) => Math.abs(quantile.probability - probability) < 1e-9)?.factor;
  return (
    [
      ['1 in 2', 0.25, 0.75],
      ['9 in 10', 0.05, 0.95],
      ['98 in 100', 0.01, 0.99],
    ] as const
  ).flatMap(([name, from, to]) => {
    const low = factorAt(from);
    const high = factorAt(to);
    return low === undefined || high === undefined ? [] : [{ name, low, high }];
  });
}

interface Props {
  readonly block: Block;
  readonly average: number;
  /** When the money is due, in words. */
  readonly when: string;
}

function Table({ block }: Pick<Props, 'block'>) {
  return (
    <table class="table">
      <thead>
        <tr>
          <th scope="col">Outcomes at or below</th>
          <th scope="col" class="num">
            Factor
          </th>
        </tr>
      </thead>
      <tbody>
        {block.quantiles.map(({ probability, factor }) => (
          <tr key={probability}>
            <th scope="row">{formatNumber(probability * 100, 0)} %</th>
            <td class="num">{formatNumber(factor, 8)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** How far the random discount factor may lie: three ranges that hold so many of the outcomes, with the marks that matter over them. */
export function Outcomes({ block, average, when }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>(640);
  const rows = ranges(block);
  const marks = [
    { key: 'expected', name: 'expected', value: block.expectedFactor },
    { key: 'average', name: 'at average rate', value: average },
  ].sort((a, b) => a.value - b.value);
  const values = [...rows.flatMap(({ low, high }) => [low, high]), ...marks.map(({ value }) => value)];
  const low = Math.min(...values);
  const high = Math.max(...values);
  const nameRoom = Math.max(0, ...rows.map(({ name }) => textWidth(name, size))) + 12;
  const valueRoom = textWidth(formatNumber(high, digits), size) + 8;
  const x = scaleLinear()
    .domain(high > low ? [low, high] : [low - 0.001, low + 0.001])
    .range([nameRoom + valueRoom, width - valueRoom - 2]);
  const places = spread(
    marks.map(({ name, value }) => ({ at: x(value), width: textWidth(name, size, 650) })),
    nameRoom,
    width,
    14,
  );
  const height = top + rows.length * row;
  const words = [
    ...marks.map(({ name, value }) => `${name} ${formatNumber(value, 6)}`),
    ...rows.map(
      (range) => `${range.name} between ${formatNumber(range.low, digits)} and ${formatNumber(range.high, digits)}`,
    ),
  ].join('; ');
  return (
    <FigureFrame name={`Discount factor to ${when}: where outcomes lie`} table={<Table block={block} />}>
      <div ref={ref} class="chart-area" style={{ blockSize: `${height}px` }}>
        <svg width={width} height={height} role="img" aria-label={`Outcomes of the discount factor: ${words}.`}>
          {rows.map(({ name, low: from, high: to }, i) => {
            const middle = top + i * row + row / 2;
            return (
              <g key={name} class={`outcome outcome-${i}`}>
                <text class="text" x={0} y={middle + 4.5}>
                  {name}
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
          {marks.map(({ key, name, value }, i) => (
            <g key={key} class={`outcome-mark mark-${key}`}>
              <polyline points={`${places[i] ?? 0},38 ${x(value)},50 ${x(value)},${height - 6}`} />
              <text class="text strong" x={places[i]} y={14} text-anchor="middle">
                {name}
              </text>
              <text class="text ink" x={places[i]} y={31} text-anchor="middle">
                {formatNumber(value, 6)}
              </text>
            </g>
          ))}
        </svg>
      </div>
    </FigureFrame>
  );
}
