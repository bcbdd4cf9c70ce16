/** How wide a text will be drawn, so that what stands beside it can be laid out. */
let pen: CanvasRenderingContext2D | null | undefined;
let family: string | undefined;
const widths = new Map<string, number>();

/** Pixels; about right where there is nothing to measure with. */
export function textWidth(text: string, size: number, weight = 400): number {
  const key = `${weight} ${size} ${text}`;
  const known = widths.get(key);
  if (known !== undefined) return known;
  if (pen === undefined)
    pen = typeof document === 'undefined' ? null : document.createElement('canvas').getContext('2d');
  if (!pen) return text.length * size * 0.6;
  family ??= getComputedStyle(document.body).fontFamily;
  pen.font = `${weight} ${size}px ${family}`;
  const width = pen.measureText(text).width;
  if (widths.size > 2000) widths.clear();
  widths.set(key, width);
  return width;
}

/** As much of the text as fits, with a mark where something is left off. */
export function shortened(text: string, room: number, size: number, weight = 400): string {
  if (textWidth(text, size, weight) <= room) return text;
  let kept = text.length - 1;
  while (kept > 1 && textWidth(`${text.slice(0, kept).trimEnd()}…`, size, weight) > room) --kept;
  return `${text.slice(0, kept).trimEnd()}…`;
}
