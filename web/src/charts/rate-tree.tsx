import { scaleLinear } from 'd3-scale';
import { formatDate, formatPercent } from '../format';
import type { RateLevels } from '../model/answer';
import { FigureFrame } from './figure-frame';
import { textWidth } from './text-width';
import { useWidth } from './use-width';

const size = 13;
const rowHeight = 40;
const top = 34;
/** With more levels than this at one meeting the odds would lie over each other: the table has them. */
const mostNamed = 12;

const odds = (probability: number): string => formatPercent(probability, probability < 0.1 ? 1 : 0);

function Values({ tree }: { readonly tree: readonly RateLevels[] }) {
  return (
    <div class="frame" role="region" aria-label="Overnight rate after each meeting, values" tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">From</th>
            <th scope="col" class="num">
              Overnight rate
            </th>
            <th scope="col" class="num">
              Odds
            </th>
          </tr>
        </thead>
        <tbody>
          {tree.flatMap(({ from, levels }) =>
            levels.map(({ rate, probability }) => (
              <tr key={`${from} ${rate}`}>
                <th scope="row">{formatDate(from)}</th>
                <td class="num">{formatPercent(rate, 3)}</td>
                <td class="num">{formatPercent(probability, 2)}</td>
              </tr>
            )),
          )}
        </tbody>
      </table>
    </div>
  );
}

/** The overnight rate from meeting to meeting: every level it can stand at, with its odds, and the moves between. */
export function RateTree({ tree }: { readonly tree: readonly RateLevels[] }) {
  const [ref, width] = useWidth<HTMLDivElement>(640);
  const rates = tree.flatMap(({ levels }) => levels.map(({ rate }) => rate));
  const low = Math.min(...rates);
  const high = Math.max(...rates);
  const most = Math.max(...tree.map(({ levels }) => levels.length));
  const height = top + rowHeight * Math.min(most, mostNamed) + 12;
  const rateTexts = [...new Set([low, ...(tree[0]?.levels.map(({ rate }) => rate) ?? []), high])];
  const left = Math.max(...rateTexts.map((rate) => textWidth(formatPercent(rate), size))) + 12;
  const x = scaleLinear()
    .domain([0, Math.max(1, tree.length - 1)])
    .range([left + 24, width - 30]);
  const y = scaleLinear()
    .domain(high > low ? [low, high] : [low - 0.001, low + 0.001])
    .range([height - 22, top + 12]);
  const named = most <= mostNamed && x(1) - x(0) > 46;
  const words = tree
    .slice(1)
    .map(
      ({ from, levels }) =>
        `from ${formatDate(from)} ${levels.map(({ rate, probability }) => `${formatPercent(rate)} with odds of ${odds(probability)}`).join(', ')}`,
    )
    .join('; ');
  const everyDate = Math.max(1, Math.ceil(64 / Math.max(1, x(1) - x(0))));
  return (
    <FigureFrame
      name="Overnight rate from meeting to meeting"
      legend="In each ring the odds of that rate, as a share of all outcomes."
      table={<Values tree={tree} />}
    >
      <div ref={ref} class="chart-area" style={{ blockSize: `${height}px` }}>
        <svg width={width} height={height} role="img" aria-label={`Overnight rate: ${words}.`}>
          {rateTexts.map((rate) => (
            <g key={rate}>
              <line class="grid" x1={left} x2={width} y1={y(rate)} y2={y(rate)} />
              <text class="text" x={left - 8} y={y(rate) + 4} text-anchor="end">
                {formatPercent(rate)}
              </text>
            </g>
          ))}
          {tree.map((stage, i) =>
            stage.branches.map(({ from, to, probability }) => (
              <line
                key={`${i} ${from} ${to}`}
                class="branch"
                x1={x(i - 1)}
                x2={x(i)}
                y1={y(tree[i - 1]?.levels[from]?.rate ?? 0)}
                y2={y(stage.levels[to]?.rate ?? 0)}
                stroke-width={0.75 + 3 * probability}
              />
            )),
          )}
          {tree.map(({ from, levels }, i) => (
            <g key={from}>
              {i % everyDate === 0 && (
                <text class="text" x={x(i)} y={14} text-anchor="middle">
                  {formatDate(from)}
                </text>
              )}
              {levels.map(({ rate, probability }) => (
                <g key={rate}>
                  <circle class="node" cx={x(i)} cy={y(rate)} r={named ? 18 : 3 + 9 * Math.sqrt(probability)} />
                  {named && (
                    <text class="text ink" x={x(i)} y={y(rate) + 4.5} text-anchor="middle" style={{ fontSize: '12px' }}>
                      {odds(probability)}
                    </text>
                  )}
                </g>
              ))}
            </g>
          ))}
        </svg>
      </div>
    </FigureFrame>
  );
}
