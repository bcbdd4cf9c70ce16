import { scaleLinear } from 'd3-scale';
import { formatNumber } from '../format';
import { FigureFrame } from './figure-frame';
import { thatFit } from './path-geometry';
import { shortened, textWidth } from './text-width';
import { useWidth } from './use-width';

const size = 13;
const row = 30;
const bottom = 26;

interface SpotRow {
  readonly name: string;
  readonly value: number;
  /** A second value on the row, drawn as a ring. */
  readonly other: number | null;
}

interface Props {
  readonly name: string;
  readonly rows: readonly SpotRow[];
  readonly digits: number;
  readonly stale: boolean;
  readonly legend: string;
}

/** One value a row on a scale of all, so that it is seen which are alike. The table beside it has the figures. */
export function Spots({ name, rows, digits, stale, legend }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>(640);
  const values = rows.flatMap(({ value, other }) => (other === null ? [value] : [value, other]));
  const low = Math.min(...values);
  const high = Math.max(...values);
  const least = 10 ** -digits * 20;
  const room = Math.max(0, least - (high - low)) / 2;
  const left = Math.min(width * 0.45, Math.max(...rows.map((each) => textWidth(each.name, size))) + 16);
  const x = scaleLinear()
    .domain([low - room, high + room])
    .range([left + 10, width - 12]);
  const height = rows.length * row + bottom;
  const ticks = thatFit(
    x.ticks(Math.max(2, Math.floor((width - left) / 110))).map((value) => {
      const text = formatNumber(value, digits);
      return { at: x(value), text, width: textWidth(text, size), weight: 0 };
    }),
    12,
  );
  const words = rows.map((each) => `${each.name} ${formatNumber(each.value, digits)}`).join(', ');
  return (
    <FigureFrame name={name} stale={stale} legend={legend}>
      <div ref={ref} class="chart-area" style={{ blockSize: `${height}px` }}>
        <svg width={width} height={height} role="img" aria-label={`${name}: ${words}.`}>
          {ticks.map(({ at, text }) => (
            <g key={at}>
              <line class="grid" x1={at} x2={at} y1={0} y2={height - bottom} />
              <text class="text" x={at} y={height - 8} text-anchor="middle">
                {text}
              </text>
            </g>
          ))}
          {rows.map((each, index) => {
            const y = index * row + row / 2;
            return (
              <g key={index}>
                <text class="text ink" x={0} y={y + 4.5}>
                  {shortened(each.name, left - 16, size)}
                </text>
                <line class="grid" x1={left} x2={width} y1={y} y2={y} />
                {each.other !== null && <circle class="node" cx={x(each.other)} cy={y} r={6} />}
                <circle class="spot" cx={x(each.value)} cy={y} r={4.5} />
              </g>
            );
          })}
        </svg>
      </div>
    </FigureFrame>
  );
}
