import { scaleLinear, scaleUtc } from 'd3-scale';
import { area, line } from 'd3-shape';
import { useState } from 'preact/hooks';
import { formatDate, formatLongDate, formatNumber, formatSigned, precisionOf, timeOf } from '../format';
import type { Precision } from '../format';
import { pathAnswer } from '../model/view';
import type { PathResult } from '../model/view';
import { FigureFrame } from './figure-frame';
import { nearest, outline, stepsByDay, tableRows, thatFit } from './path-geometry';
import type { PathPoint } from './path-geometry';
import { textWidth } from './text-width';
import { timeTicks } from './time-ticks';
import { useWidth } from './use-width';

const height = 264;
const size = 13;
const top = 26;
const bottom = 30;
const right = 14;

interface Drawn {
  readonly path: PathResult;
  readonly precision: Precision;
}

function frame({ path, precision }: Drawn, width: number) {
  const points = outline(path);
  const first = points[0]?.time ?? 0;
  const last = points.at(-1)?.time ?? 1;
  const low = Math.min(...points.map(({ bid, fair }) => Math.min(bid, fair)));
  const high = Math.max(...points.map(({ offer, fair }) => Math.max(offer, fair)));
  const room = high > low ? 0 : Math.abs(high) * 0.01 || 1;
  const y = scaleLinear()
    .domain([low - room, high + room])
    .nice(4)
    .range([height - bottom, top]);
  const ticks = y.ticks(4);
  const digits = Math.max(0, -Math.floor(Math.log10((ticks[1] ?? 1) - (ticks[0] ?? 0)) + 1e-9));
  const named = ticks.map((value) => ({ value, text: formatNumber(value, Math.min(digits, precision.between + 1)) }));
  const left = Math.ceil(Math.max(...named.map(({ text }) => textWidth(text, size)))) + 10;
  const x = scaleUtc()
    .domain([first, last > first ? last : first + 1])
    .range([left, width - right]);
  return { points, x, y, named, left };
}

type Frame = ReturnType<typeof frame>;

function Axes({ x, y, named, left, width }: Frame & { readonly width: number }) {
  return (
    <>
      {named.map(({ value, text }) => (
        <g key={value}>
          <line class="grid" x1={left} x2={width - right} y1={y(value)} y2={y(value)} />
          <text class="text" x={left - 8} y={y(value) + 4} text-anchor="end">
            {text}
          </text>
        </g>
      ))}
      {timeTicks(x, width).map(({ at, text }) => (
        <text key={at} class="text" x={at} y={height - 8} text-anchor="middle">
          {text}
        </text>
      ))}
    </>
  );
}

/** What each distribution takes off, over its step; where there are many, the largest that fit. */
function StepNames({ path, precision, points, x, y, left, width }: Drawn & Frame & { readonly width: number }) {
  const names = stepsByDay(path).map(({ time, date, change }) => {
    const text = formatSigned(change, precision.between);
    const wide = textWidth(text, size);
    const over = points.filter((point) => point.date === date).map(({ offer, fair }) => Math.max(offer, fair));
    const at = Math.min(Math.max(x(time), left + wide / 2), width - right - wide / 2);
    return { date, text, at, width: wide, weight: Math.abs(change), over: Math.max(...over) };
  });
  return (
    <>
      {thatFit(names, 8).map(({ date, text, at, over }) => (
        <text key={date} class="text strong" x={at} y={y(over) - 7} text-anchor="middle">
          {text}
        </text>
      ))}
    </>
  );
}

function Lines({ points, x, y }: Frame) {
  const band = area<PathPoint>()
    .x(({ time }) => x(time))
    .y0(({ bid }) => y(bid))
    .y1(({ offer }) => y(offer));
  const fair = line<PathPoint>()
    .x(({ time }) => x(time))
    .y((point) => y(point.fair));
  const first = points[0];
  return (
    <>
      <path class="band" d={band(points) ?? ''} />
      <path class="line" d={fair(points) ?? ''} />
      {first && <circle class="start" cx={x(first.time)} cy={y(first.fair)} r={4} />}
    </>
  );
}

function Cursor({ point, x, y }: Pick<Frame, 'x' | 'y'> & { readonly point: PathResult['points'][number] }) {
  const at = x(timeOf(point.date));
  return (
    <g class="cursor">
      <line x1={at} x2={at} y1={top - 8} y2={height - bottom} />
      <line class="reach" x1={at} x2={at} y1={y(point.bid)} y2={y(point.offer)} />
      <circle cx={at} cy={y(point.fair)} r={4.5} />
    </g>
  );
}

function inWords({ date, fair, bid, offer }: PathResult['points'][number], { between }: Precision): string {
  return `${formatLongDate(date)}: fair ${formatNumber(fair, between)}, break-evens ${formatNumber(bid, between)} and ${formatNumber(offer, between)}`;
}

/** How far the keys move the cursor; no other key is taken from the person. */
const moves: Readonly<Record<string, (index: number, last: number) => number>> = {
  ArrowLeft: (index) => index - 1,
  ArrowDown: (index) => index - 1,
  ArrowRight: (index) => index + 1,
  ArrowUp: (index) => index + 1,
  PageDown: (index) => index - 20,
  PageUp: (index) => index + 20,
  Home: () => 0,
  End: (_, last) => last,
};

function Table({ path, precision }: Drawn) {
  const changes = new Map(stepsByDay(path).map(({ date, change }) => [date, change]));
  return (
    <div class="frame" role="region" aria-label="Forward by delivery date, values" tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Maturity</th>
            <th scope="col" class="num">
              Break-even bid
            </th>
            <th scope="col" class="num">
              Fair
            </th>
            <th scope="col" class="num">
              Break-even offer
            </th>
            <th scope="col" class="num">
              Step
            </th>
          </tr>
        </thead>
        <tbody>
          {tableRows(path).map(({ date, bid, fair, offer }) => (
            <tr key={date}>
              <th scope="row">{formatDate(date)}</th>
              <td class="num">{formatNumber(bid, precision.between)}</td>
              <td class="num">{formatNumber(fair, precision.between)}</td>
              <td class="num">{formatNumber(offer, precision.between)}</td>
              <td class="num">{changes.has(date) ? formatSigned(changes.get(date) ?? 0, precision.between) : ''}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Picture({ path, precision, stale }: Drawn & { readonly stale: boolean }) {
  const [ref, width] = useWidth<HTMLDivElement>(560);
  const [chosen, setChosen] = useState<number | null>(null);
  const drawn = frame({ path, precision }, width);
  const last = path.points.length - 1;
  const index = chosen === null ? last : Math.min(chosen, last);
  const point = path.points[index];
  if (!point) return null;

  const follow = (event: PointerEvent): void => {
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect();
    setChosen(nearest(path.points, drawn.x.invert(event.clientX - box.left).getTime()));
  };
  const step = (event: KeyboardEvent): void => {
    const move = moves[event.key];
    if (!move || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    setChosen(Math.min(last, Math.max(0, move(index, last))));
  };

  return (
    <FigureFrame
      name="Forward by delivery date"
      stale={stale}
      beside={
        <p class="chart-read num">
          <span>{formatDate(point.date)}</span> <b>{formatNumber(point.fair, precision.between)}</b>{' '}
          <span>
            {formatNumber(point.bid, precision.between)} – {formatNumber(point.offer, precision.between)}
          </span>
        </p>
      }
      legend="Line: fair. Band: between the break-evens. Ring: spot."
      table={<Table path={path} precision={precision} />}
    >
      <div
        ref={ref}
        class="chart-area"
        style={{ blockSize: `${height}px` }}
        role="slider"
        tabIndex={0}
        aria-label="Forward by delivery date"
        aria-orientation="horizontal"
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={index}
        aria-valuetext={inWords(point, precision)}
        onPointerMove={follow}
        onPointerDown={follow}
        onPointerLeave={() => setChosen(null)}
        onKeyDown={step}
        onBlur={() => setChosen(null)}
      >
        <svg width={width} height={height} aria-hidden="true">
          <Axes {...drawn} width={width} />
          <Lines {...drawn} />
          <StepNames path={path} precision={precision} {...drawn} width={width} />
          <Cursor point={point} x={drawn.x} y={drawn.y} />
        </svg>
      </div>
    </FigureFrame>
  );
}

/**
 * The forward against its delivery date: from spot, climbing with funding, stepping down at every distribution, with the
 * band between the break-evens. The cursor reads any date, by pointer or by arrow keys; at rest it stands at maturity.
 */
export function CarryPath() {
  const { good, stale } = pathAnswer.value;
  const spot = good?.result.points[0]?.fair;
  if (!good || spot === undefined) return <div class="chart chart-empty" />;
  return <Picture path={good.result} precision={precisionOf(good.request.market.asset.tick, spot)} stale={stale} />;
}
