import { scaleLinear } from 'd3-scale';
import { spread } from '../charts/spread';
import { textWidth } from '../charts/text-width';
import { useWidth } from '../charts/use-width';
import { formatNumber } from '../format';
import type { Precision } from '../format';
import type { QuoteResult } from '../model/view';

const textSize = 13;
const line = 52;
const height = 104;

interface Mark {
  readonly key: string;
  readonly word: string;
  readonly value: number;
  readonly text: string;
}

interface Props {
  readonly result: Pick<QuoteResult, 'fair' | 'breakEven' | 'quote'>;
  readonly precision: Precision;
}

function quoted({ quote }: Props['result'], { dealt }: Precision): Mark[] {
  const marks: Mark[] = [];
  if (quote.bid !== null)
    marks.push({ key: 'bid', word: 'Our bid', value: quote.bid, text: formatNumber(quote.bid, dealt) });
  if (quote.offer !== null)
    marks.push({ key: 'offer', word: 'Our offer', value: quote.offer, text: formatNumber(quote.offer, dealt) });
  return marks;
}

function between({ fair, breakEven }: Props['result'], { between: digits }: Precision): Mark[] {
  const marks = [
    { key: 'even-bid', word: 'break-even', value: breakEven.bid, text: formatNumber(breakEven.bid, digits) },
    { key: 'fair', word: 'fair', value: fair, text: formatNumber(fair, digits) },
    { key: 'even-offer', word: 'break-even', value: breakEven.offer, text: formatNumber(breakEven.offer, digits) },
  ];
  return marks.sort((a, b) => a.value - b.value);
}

/** One sentence with what the picture shows. */
function inWords(marks: readonly Mark[]): string {
  return `From low to high: ${[...marks]
    .sort((a, b) => a.value - b.value)
    .map(({ word, text }) => `${word.toLowerCase()} ${text}`)
    .join(', ')}.`;
}

/**
 * Where bid and offer stand against the prices at which nobody gains: quoted prices above the line, break-evens and
 * fair under it, the corridor between the break-evens as a band. Labels move aside rather than lie over each other.
 */
export function Corridor({ result, precision }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>(640);
  const above = quoted(result, precision);
  const below = between(result, precision);
  const values = [...above, ...below].map(({ value }) => value);
  const low = Math.min(...values);
  const high = Math.max(...values);
  const edge = 36;
  const x = scaleLinear()
    .domain(high > low ? [low, high] : [low - 1, low + 1])
    .range([edge, width - edge]);

  const labelled = (marks: readonly Mark[], weight: number) => {
    const wide = (mark: Mark) =>
      Math.max(textWidth(mark.word, textSize, 400), textWidth(mark.text, textSize + 1, weight));
    const places = spread(
      marks.map((mark) => ({ at: x(mark.value), width: wide(mark) })),
      0,
      width,
      10,
    );
    return marks.map((mark, i) => ({ ...mark, at: x(mark.value), middle: places[i] ?? x(mark.value) }));
  };
  const left = x(result.breakEven.bid);
  const right = x(result.breakEven.offer);

  return (
    <div class="corridor" ref={ref} style={{ blockSize: `${height}px` }}>
      <svg width={width} height={height} role="img" aria-label={inWords([...above, ...below])}>
        <line class="corridor-line" x1={0} x2={width} y1={line} y2={line} />
        <rect
          class="corridor-band"
          x={Math.min(left, right)}
          y={line - 5}
          width={Math.max(1, Math.abs(right - left))}
          height={10}
        />
        {labelled(below, 600).map(({ key, word, text, at, middle }) => (
          <g key={key} class={key === 'fair' ? 'mark-fair' : 'mark-even'}>
            <polyline points={`${at},${line - 5} ${at},${line + 11} ${middle},${line + 18}`} />
            <text class="word" x={middle} y={line + 32} text-anchor="middle">
              {word}
            </text>
            <text class="value" x={middle} y={line + 48} text-anchor="middle">
              {text}
            </text>
          </g>
        ))}
        {labelled(above, 650).map(({ key, word, text, at, middle }) => (
          <g key={key} class="mark-quoted">
            <polyline points={`${at},${line + 5} ${at},${line - 11} ${middle},${line - 18}`} />
            <text class="word" x={middle} y={line - 38} text-anchor="middle">
              {word}
            </text>
            <text class="value" x={middle} y={line - 22} text-anchor="middle">
              {text}
            </text>
          </g>
        ))}
      </svg>
    </div>
  );
}
