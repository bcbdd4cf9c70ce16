import { scaleLinear, scaleUtc } from 'd3-scale';
import { area, line } from 'd3-shape';
import { Fragment, type ComponentChildren } from 'preact';
import { useState } from 'preact/hooks';
import { FigureFrame } from './figure-frame';
import { thatFit } from './path-geometry';
import { textWidth } from './text-width';
import { timeTicks } from './time-ticks';
import { useWidth } from './use-width';

const size = 13;
const top = 14;
const bottom = 30;
const right = 14;

/** A line over the places of `xs`; a null breaks it. `look` is how it is drawn: no two of a picture alike. */
export interface PlotLine {
  readonly name: string;
  readonly look: 'main' | 'dashed' | 'dotted';
  readonly values: readonly (number | null)[];
}
/** The room between two lines; `weight` 0 is the lightest. */
export interface PlotBand {
  readonly name: string;
  readonly weight: 0 | 1 | 2;
  readonly low: readonly number[];
  readonly high: readonly number[];
}
/** A level that everything is seen against. */
export interface PlotLevel {
  readonly name: string;
  readonly value: number;
}

interface PlotProps {
  readonly name: string;
  /** The places, rising: milliseconds of a date, or numbers. */
  readonly xs: readonly number[];
  readonly axis: 'date' | 'number';
  readonly xName: string;
  readonly xText: (x: number) => string;
  readonly yText: (y: number) => string;
  readonly lines?: readonly PlotLine[];
  readonly bands?: readonly PlotBand[];
  readonly levels?: readonly PlotLevel[];
  /** Thin lines to be seen, not read: single paths of what the bands tell of all. */
  readonly traces?: readonly (readonly number[])[];
  /** Where the cursor rests while nobody moves it. */
  readonly rest?: number;
  /** The least room of the vertical axis, so that rounding is not drawn as mountains. */
  readonly leastRange?: number;
  readonly height?: number;
  readonly stale?: boolean;
  readonly legend?: string;
  readonly beside?: ComponentChildren;
}

function nearestIndex(xs: readonly number[], x: number): number {
  let best = 0;
  xs.forEach((value, index) => {
    if (Math.abs(value - x) < Math.abs((xs[best] ?? 0) - x)) best = index;
  });
  return best;
}

function frameOf(props: PlotProps, width: number, height: number) {
  const { xs, lines = [], bands = [], levels = [], traces = [], yText, leastRange = 0 } = props;
  const ys = [
    ...lines.flatMap(({ values }) => values.filter((value) => value !== null)),
    ...bands.flatMap(({ low, high }) => [...low, ...high]),
    ...traces.flat(),
    ...levels.map(({ value }) => value),
  ];
  const lowest = Math.min(...ys);
  const highest = Math.max(...ys);
  const room =
    Math.max(0, leastRange - (highest - lowest)) / 2 || (highest > lowest ? 0 : Math.abs(highest) / 100 || 1);
  const y = scaleLinear()
    .domain([lowest - room, highest + room])
    .nice(4)
    .range([height - bottom, top]);
  const ticks = y.ticks(4).map((value) => ({ value, text: yText(value) }));
  const left = Math.ceil(Math.max(0, ...ticks.map(({ text }) => textWidth(text, size)))) + 10;
  const first = xs[0] ?? 0;
  const last = xs.at(-1) ?? 1;
  const domain = [first, last > first ? last : first + 1] as const;
  const range = [left, width - right] as const;
  const time = scaleUtc().domain(domain).range(range);
  const number = scaleLinear().domain(domain).range(range);
  const x = (value: number): number => (props.axis === 'date' ? time(value) : number(value));
  const xTicks =
    props.axis === 'date'
      ? timeTicks(time, width)
      : thatFit(
          number.ticks(Math.max(2, Math.floor((width - left) / 80))).map((value) => {
            const text = props.xText(value);
            const wide = textWidth(text, size);
            return { at: Math.min(number(value), width - wide / 2), text, width: wide, weight: 0 };
          }),
          12,
        );
  const back = (at: number): number => number.invert(at);
  return { x, y, ticks, xTicks, left, back };
}

/** How far the keys move the cursor. */
const moves: Readonly<Record<string, (index: number, last: number) => number>> = {
  ArrowLeft: (index) => index - 1,
  ArrowDown: (index) => index - 1,
  ArrowRight: (index) => index + 1,
  ArrowUp: (index) => index + 1,
  PageDown: (index) => index - 5,
  PageUp: (index) => index + 5,
  Home: () => 0,
  End: (_, last) => last,
};

/** What stands at a place: every line, band and level by its name. */
function readings({ lines = [], bands = [], yText }: PlotProps, index: number): { name: string; text: string }[] {
  return [
    ...lines.map(({ name, values }) => {
      const value = values[index];
      return { name, text: value === null || value === undefined ? '–' : yText(value) };
    }),
    ...bands.map(({ name, low, high }) => ({
      name,
      text: `${yText(low[index] ?? 0)} – ${yText(high[index] ?? 0)}`,
    })),
  ];
}

function Values(props: PlotProps) {
  const { name, xs, xName, xText, levels = [], yText } = props;
  const names = readings(props, 0).map((reading) => reading.name);
  return (
    <div class="frame" role="region" aria-label={`${name}, values`} tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">{xName}</th>
            {names.map((column) => (
              <th key={column} scope="col" class="num">
                {column}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {xs.map((x, index) => (
            <tr key={x}>
              <th scope="row">{xText(x)}</th>
              {readings(props, index).map((reading) => (
                <td key={reading.name} class="num">
                  {reading.text}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {levels.map((level) => (
        <p key={level.name} class="muted">
          {level.name}: <span class="num">{yText(level.value)}</span>
        </p>
      ))}
    </div>
  );
}

/** Lines, bands and levels over dates or numbers; a cursor reads any place, by pointer or by arrow keys. */
export function Plot(props: PlotProps) {
  const { name, xs, lines = [], bands = [], levels = [], height = 220, stale = false, legend, beside } = props;
  const [ref, width] = useWidth<HTMLDivElement>(560);
  const [chosen, setChosen] = useState<number | null>(null);
  const last = xs.length - 1;
  if (last < 0) return null;
  const { x, y, ticks, xTicks, left, back } = frameOf(props, width, height);
  const index = Math.max(0, Math.min(chosen ?? props.rest ?? last, last));
  const place = xs[index] ?? 0;
  const read = readings(props, index);

  const follow = (event: PointerEvent): void => {
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect();
    setChosen(nearestIndex(xs, back(event.clientX - box.left)));
  };
  const step = (event: KeyboardEvent): void => {
    const move = moves[event.key];
    if (!move || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    setChosen(Math.min(last, Math.max(0, move(index, last))));
  };
  const indexes = xs.map((_, i) => i);
  const pathOf = ({ values }: PlotLine): string =>
    line<number>()
      .defined((i) => values[i] !== null && values[i] !== undefined)
      .x((i) => x(xs[i] ?? 0))
      .y((i) => y(values[i] ?? 0))(indexes) ?? '';
  const areaOf = ({ low, high }: PlotBand): string =>
    area<number>()
      .x((i) => x(xs[i] ?? 0))
      .y0((i) => y(low[i] ?? 0))
      .y1((i) => y(high[i] ?? 0))(indexes) ?? '';

  return (
    <FigureFrame
      name={name}
      stale={stale}
      beside={
        beside ?? (
          <p class="chart-read">
            <span class="num">{props.xText(place)}</span>
            {read.slice(0, 2).map((reading) => (
              <Fragment key={reading.name}>
                {' '}
                <span class="num">
                  {reading.name} <b>{reading.text}</b>
                </span>
              </Fragment>
            ))}
          </p>
        )
      }
      {...(legend === undefined ? {} : { legend })}
      table={<Values {...props} />}
    >
      <div
        ref={ref}
        class="chart-area"
        style={{ blockSize: `${height}px` }}
        role="slider"
        tabIndex={0}
        aria-label={name}
        aria-orientation="horizontal"
        aria-valuemin={0}
        aria-valuemax={last}
        aria-valuenow={index}
        aria-valuetext={`${props.xText(place)}: ${read.map((reading) => `${reading.name} ${reading.text}`).join(', ')}`}
        onPointerMove={follow}
        onPointerDown={follow}
        onPointerLeave={() => setChosen(null)}
        onKeyDown={step}
        onBlur={() => setChosen(null)}
      >
        <svg width={width} height={height} aria-hidden="true">
          {bands.map((band) => (
            <path key={band.name} class={`band band-${band.weight}`} d={areaOf(band)} />
          ))}
          {ticks.map(({ value, text }) => (
            <g key={value}>
              <line class="grid" x1={left} x2={width - right} y1={y(value)} y2={y(value)} />
              <text class="text" x={left - 8} y={y(value) + 4} text-anchor="end">
                {text}
              </text>
            </g>
          ))}
          {xTicks.map(({ at, text }) => (
            <text key={at} class="text" x={at} y={height - 8} text-anchor="middle">
              {text}
            </text>
          ))}
          {levels.map((level) => (
            <line
              key={level.name}
              class="plot-level"
              x1={left}
              x2={width - right}
              y1={y(level.value)}
              y2={y(level.value)}
            />
          ))}
          {(props.traces ?? []).map((values, i) => (
            <path key={i} class="line line-trace" d={pathOf({ name: '', look: 'main', values })} />
          ))}
          {lines.map((drawn) => (
            <path key={drawn.name} class={`line line-${drawn.look}`} d={pathOf(drawn)} />
          ))}
          <g class="cursor">
            <line x1={x(place)} x2={x(place)} y1={top - 8} y2={height - bottom} />
            {lines.map((drawn) => {
              const value = drawn.values[index];
              return value === null || value === undefined ? null : (
                <circle key={drawn.name} cx={x(place)} cy={y(value)} r={4} />
              );
            })}
          </g>
        </svg>
      </div>
    </FigureFrame>
  );
}
