import type { ComponentChildren } from 'preact';
import { useId } from 'preact/hooks';
import { openCards, toggleCard } from '../store/preferences';

interface CardProps {
  readonly id: string;
  readonly name: string;
  /** What is read first, beside the name. */
  readonly value: string;
  readonly summary: string;
  /** In the Market place every card lies open. */
  readonly alwaysOpen: boolean;
  readonly children: ComponentChildren;
}

/** A part of the market: its summary closed, its fields open. */
export function Card({ id, name, value, summary, alwaysOpen, children }: CardProps) {
  const bodyId = useId();
  const open = alwaysOpen || openCards.value.has(id);
  return (
    <section class="card" data-card={id}>
      <h3>
        {alwaysOpen ? (
          <span class="card-head card-head-fixed">
            <span class="card-name">{name}</span>
            <span class="card-value">{value}</span>
          </span>
        ) : (
          <button
            type="button"
            class="card-head"
            aria-expanded={open}
            aria-controls={bodyId}
            onClick={() => toggleCard(id, !open)}
          >
            <span class="card-name">{name}</span>
            <span class="card-value">{value}</span>
          </button>
        )}
      </h3>
      <p class="card-summary">{summary}</p>
      <div class="card-body" id={bodyId} hidden={!open}>
        {open && children}
      </div>
    </section>
  );
}

export interface CardView {
  readonly alwaysOpen: boolean;
}
