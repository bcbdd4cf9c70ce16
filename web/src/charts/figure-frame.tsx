import type { ComponentChildren } from 'preact';
import { useState } from 'preact/hooks';

interface Props {
  readonly name: string;
  /** Stands beside the name: a switch between sides, or what the cursor reads. */
  readonly beside?: ComponentChildren;
  readonly stale?: boolean;
  readonly children: ComponentChildren;
  /** The same values as a table, for who does not see the picture or wants the figures. */
  readonly table?: ComponentChildren;
  /** What the lines and fills are. */
  readonly legend?: string;
}

/** The values are made once they are asked for: a picture that changes while one looks on has less to do. */
function Values({ children }: { readonly children: ComponentChildren }) {
  const [open, setOpen] = useState(false);
  return (
    <details class="chart-values" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>Values</summary>
      {open && children}
    </details>
  );
}

/** A picture with its name and its values in reach. */
export function FigureFrame({ name, beside, stale = false, children, table, legend }: Props) {
  return (
    <figure class="chart" data-stale={stale}>
      <figcaption class="chart-head">
        <h3>{name}</h3>
        {beside}
      </figcaption>
      {children}
      {legend && <p class="chart-legend">{legend}</p>}
      {table && <Values>{table}</Values>}
    </figure>
  );
}
