import { scaleLinear } from 'd3-scale';
import { useState } from 'preact/hooks';
import { formatNumber, formatSigned } from '../format';
import type { Precision } from '../format';
import { settledAnswer } from '../model/view';
import type { BridgeStep, QuoteResult, Side } from '../model/view';
import { pricePrecision } from '../quote/words';
import { bridgeName } from './bridge-names';
import { FigureFrame } from './figure-frame';
import { textWidth } from './text-width';
import { useWidth } from './use-width';

const size = 13;
const row = 29;

interface Row {
  readonly step: BridgeStep;
  readonly name: string;
  readonly text: string;
  readonly from: number;
}

/** With the decimals of the price; what would be shown as 0 by its first two figures. */
function changeText(change: number, digits: number): string {
  if (change === 0 || Math.abs(change) >= 0.5 * 10 ** -digits) return formatSigned(change, digits);
  return formatSigned(change, Math.min(12, 1 - Math.floor(Math.log10(Math.abs(change)))));
}

function rowsOf(steps: readonly BridgeStep[], side: Side, { between }: Precision): Row[] {
  return steps.map((step) => ({
    step,
    name: bridgeName(step.code, side),
    text: step.total ? formatNumber(step.level, between) : changeText(step.change, between),
    from: step.level - step.change,
  }));
}

/** A level is a mark on its height; a change is a bar from the level before to the level after: up full, down hollow. `room` is for so many rows, so that a change of sides moves nothing below. */
function Bars({ rows, side, room }: { readonly rows: readonly Row[]; readonly side: Side; readonly room: number }) {
  const [ref, width] = useWidth<HTMLDivElement>(560);
  const nameWidth = Math.max(...rows.map(({ name }) => textWidth(name, size, 650))) + 14;
  const textRoom = Math.max(...rows.map(({ text }) => textWidth(text, size, 650))) + 10;
  const levels = rows.flatMap(({ step, from }) => [step.level, from]);
  const low = Math.min(...levels);
  const high = Math.max(...levels);
  const x = scaleLinear()
    .domain(high > low ? [low, high] : [low - 1, low + 1])
    .range([nameWidth + 4, width - textRoom - 4]);
  const height = room * row + 4;
  return (
    <div ref={ref} class="chart-area" style={{ blockSize: `${height}px` }}>
      <svg
        width={width}
        height={height}
        role="img"
        aria-label={`From spot to ${bridgeName('quote', side).toLowerCase()}: ${rows.map(({ name, text }) => `${name} ${text}`).join(', ')}.`}
      >
        {rows.map(({ step, name, text, from }, i) => {
          const middle = i * row + row / 2;
          const start = x(Math.min(from, step.level));
          const end = x(Math.max(from, step.level));
          return (
            <g key={step.code} class={step.total ? 'total' : step.change < 0 ? 'down' : 'up'}>
              <text class={step.total ? 'text strong' : 'text'} x={0} y={middle + 4.5}>
                {name}
              </text>
              {i + 1 < rows.length && (
                <line class="link-line" x1={x(step.level)} x2={x(step.level)} y1={middle} y2={middle + row} />
              )}
              {step.total ? (
                <rect class="level" x={x(step.level) - 2} y={middle - 10} width={4} height={20} />
              ) : (
                <rect class="change" x={start} y={middle - 7} width={Math.max(2, end - start)} height={14} />
              )}
              <text class={step.total ? 'text strong' : 'text ink'} x={end + 9} y={middle + 4.5}>
                {text}
              </text>
            </g>
          );
        })}
      </svg>
    </div>
  );
}

function Table({ rows }: { readonly rows: readonly Row[] }) {
  return (
    <div class="frame" role="region" aria-label="From spot to quote, values" tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Part</th>
            <th scope="col" class="num">
              Change
            </th>
            <th scope="col" class="num">
              Level
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ step, name, text }) => (
            <tr key={step.code} class={step.total ? 'total' : undefined}>
              <th scope="row">{name}</th>
              <td class="num">{step.total ? '' : text}</td>
              <td class="num">{formatNumber(step.level, 4)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** The side shown: the one chosen where it was asked for, else the other. */
function sideShown(bridge: QuoteResult['bridge'], chosen: Side): Side {
  if (bridge?.[chosen]) return chosen;
  return chosen === 'bid' ? 'offer' : 'bid';
}

/** The way from spot over the fair forward to what the client is told. */
export function Bridge() {
  const [chosen, setChosen] = useState<Side>('offer');
  const { good, stale } = settledAnswer.value;
  const bridge = good?.result.bridge;
  const side = sideShown(bridge, chosen);
  const steps = bridge?.[side];
  if (!good || !steps) return <div class="chart chart-empty" />;
  const rows = rowsOf(steps, side, pricePrecision(good.request, good.result));
  const both = bridge.bid !== null && bridge.offer !== null;
  return (
    <FigureFrame
      name={`From spot to our ${side}`}
      stale={stale}
      beside={
        both && (
          <div class="segmented" role="radiogroup" aria-label="Side of the bridge">
            {(['bid', 'offer'] as const).map((each) => (
              <label key={each}>
                <input type="radio" name="bridge-side" checked={side === each} onChange={() => setChosen(each)} />
                {each === 'bid' ? 'Bid' : 'Offer'}
              </label>
            ))}
          </div>
        )
      }
      legend="Mark: a level. Full bar: up. Hollow bar: down."
      table={<Table rows={rows} />}
    >
      <Bars rows={rows} side={side} room={Math.max(bridge.bid?.length ?? 0, bridge.offer?.length ?? 0)} />
    </FigureFrame>
  );
}
