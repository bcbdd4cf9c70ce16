import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { useState } from 'preact/hooks';
import { formatNumber } from '../format';
import type { SimulateWholeResult } from '../model/answer';
import { FigureFrame } from './figure-frame';
import { spread } from './spread';
import { textWidth } from './text-width';
import { useWidth } from './use-width';

const size = 13;
const height = 220;
const top = 46;
const bottom = 30;
const digits = 5;

type Histogram = SimulateWholeResult['histogram'];

interface Mark {
  readonly name: string;
  readonly value: number;
}

interface Bin {
  readonly low: number;
  readonly high: number;
  readonly count: number;
  /** How many the law puts there; null where it is not known. */
  readonly law: number | null;
}

function binsOf({ edges, counts, law }: Histogram): readonly Bin[] {
  return counts.map((count, i) => ({ low: edges[i] ?? 0, high: edges[i + 1] ?? 0, count, law: law?.[i] ?? null }));
}

/** Where the bin lies, what came up there, and what the law puts there. */
function readingsOf({ low, high, count, law }: Bin): readonly string[] {
  return [
    `${formatNumber(low, digits)} to ${formatNumber(high, digits)}: ${formatNumber(count)} paths`,
    ...(law === null ? [] : [`by the law ${formatNumber(law, 0)}`]),
  ];
}

function Values({ histogram, bins }: { readonly histogram: Histogram; readonly bins: readonly Bin[] }) {
  return (
    <div class="frame" role="region" aria-label="Simulated discount factors, values" tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Discount factor</th>
            <th scope="col" class="num">
              Paths
            </th>
            {histogram.law && (
              <th scope="col" class="num">
                By the law
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          <tr>
            <th scope="row">below {formatNumber(histogram.low, digits)}</th>
            <td class="num">{formatNumber(histogram.below)}</td>
            {histogram.law && <td />}
          </tr>
          {bins.map((bin, i) => (
            <tr key={i}>
              <th scope="row">
                {formatNumber(bin.low, digits)} to {formatNumber(bin.high, digits)}
              </th>
              <td class="num">{formatNumber(bin.count)}</td>
              {bin.law !== null && <td class="num">{formatNumber(bin.law, 1)}</td>}
            </tr>
          ))}
          <tr>
            <th scope="row">above {formatNumber(histogram.high, digits)}</th>
            <td class="num">{formatNumber(histogram.above)}</td>
            {histogram.law && <td />}
          </tr>
        </tbody>
      </table>
    </div>
  );
}

const moves: Readonly<Record<string, (index: number, last: number) => number>> = {
  ArrowLeft: (index) => index - 1,
  ArrowDown: (index) => index - 1,
  ArrowRight: (index) => index + 1,
  ArrowUp: (index) => index + 1,
  Home: () => 0,
  End: (_, last) => last,
};

interface Props {
  readonly histogram: Histogram;
  /** All but the first are drawn dashed. */
  readonly marks: readonly Mark[];
  readonly when: string;
}

/** How often each discount factor came up, with the marks that matter over it. */
export function FactorHistogram({ histogram, marks: given, when }: Props) {
  const marks = given.map((mark, index) => ({ ...mark, dashed: index > 0 })).sort((a, b) => a.value - b.value);
  const [ref, width] = useWidth<HTMLDivElement>(560);
  const [chosen, setChosen] = useState<number | null>(null);
  const bins = binsOf(histogram);
  const last = bins.length - 1;
  const fullest = Math.max(1, ...bins.map(({ count }) => count));
  const most = Math.max(fullest, ...(histogram.law ?? []));
  const index = Math.max(0, Math.min(chosen ?? bins.findIndex(({ count }) => count === fullest), last));
  const bin = bins[index];
  if (!bin) return null;
  const values = [histogram.low, histogram.high, ...marks.map(({ value }) => value)];
  const x = scaleLinear()
    .domain([Math.min(...values), Math.max(...values)])
    .range([2, width - 2]);
  const y = scaleLinear()
    .domain([0, most])
    .range([height - bottom, top]);
  const places = spread(
    marks.map(({ name, value }) => ({ at: x(value), width: textWidth(name, size, 650) })),
    0,
    width,
    14,
  );
  const ends = [histogram.low, histogram.high];
  const lawLine = line<Bin>()
    .x(({ low, high }) => x((low + high) / 2))
    .y(({ law }) => y(law ?? 0));
  const step = (event: KeyboardEvent): void => {
    const move = moves[event.key];
    if (!move || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    setChosen(Math.min(last, Math.max(0, move(index, last))));
  };
  const follow = (event: PointerEvent): void => {
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect();
    const at = x.invert(event.clientX - box.left);
    const found = bins.findIndex(({ high }) => at < high);
    setChosen(found < 0 ? last : found);
  };
  return (
    <FigureFrame
      name={`Simulated discount factors to ${when}`}
      beside={
        <p class="chart-read">
          {readingsOf(bin).map((reading) => (
            <span key={reading} class="num">
              {reading}{' '}
            </span>
          ))}
        </p>
      }
      {...(histogram.law ? { legend: 'Bars: paths as they came up. Line: as many by the closed form’s law.' } : {})}
      table={<Values histogram={histogram} bins={bins} />}
    >
      <div
        ref={ref}
        class="chart-area"
        style={{ blockSize: `${height}px` }}
        role="slider"
        tabIndex={0}
        aria-label={`Simulated discount factors to ${when}`}
        aria-orientation="horizontal"
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={index}
        aria-valuetext={readingsOf(bin).join(', ')}
        onPointerMove={follow}
        onPointerDown={follow}
        onPointerLeave={() => setChosen(null)}
        onKeyDown={step}
        onBlur={() => setChosen(null)}
      >
        <svg width={width} height={height} aria-hidden="true">
          {bins.map(({ low, high, count }, i) => (
            <rect
              key={i}
              class={i === index ? 'bar chosen' : 'bar'}
              x={x(low)}
              width={Math.max(1, x(high) - x(low) - 1)}
              y={y(count)}
              height={y(0) - y(count)}
            />
          ))}
          {histogram.law && <path class="line line-law" d={lawLine(bins) ?? ''} />}
          {ends.map((value, i) => (
            <text key={i} class="text" x={x(value)} y={height - 8} text-anchor={i === 0 ? 'start' : 'end'}>
              {formatNumber(value, digits)}
            </text>
          ))}
          {marks.map(({ name, value, dashed }, i) => (
            <g key={name} class={`outcome-mark${dashed ? ' mark-dashed' : ''}`}>
              <polyline points={`${places[i] ?? 0},34 ${x(value)},44 ${x(value)},${height - bottom}`} />
              <text class="text strong" x={places[i]} y={14} text-anchor="middle">
                {name}
              </text>
              <text class="text ink" x={places[i]} y={30} text-anchor="middle">
                {formatNumber(value, 6)}
              </text>
            </g>
          ))}
        </svg>
      </div>
    </FigureFrame>
  );
}
