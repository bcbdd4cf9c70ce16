import type { FunctionComponent } from 'preact';
import { useEffect, useRef } from 'preact/hooks';
import { panel, panels, settledAnswer, showPanel } from '../model/view';
import type { Panel, QuoteRequest, QuoteResult } from '../model/view';
import { Income } from './income';
import { Ledger } from './ledger';
import { RandomDiscount } from './random-discount';
import { Sensitivities } from './sensitivities';
import { Working } from './working';

interface Content {
  readonly name: string;
  readonly view: FunctionComponent<{ readonly request: QuoteRequest; readonly result: QuoteResult }>;
}

/** One line a panel: a new one is added here and in the list of panels. */
const contents: Readonly<Record<Panel, Content>> = {
  working: { name: 'Working', view: Working },
  ledger: { name: 'Ledger', view: Ledger },
  income: { name: 'Income', view: Income },
  sensitivities: { name: 'Sensitivities', view: Sensitivities },
  random: { name: 'Random discount', view: RandomDiscount },
};

/** Where the keys lead from the tab at `index`. */
const moves: Readonly<Record<string, (index: number) => number>> = {
  ArrowLeft: (index) => (index + panels.length - 1) % panels.length,
  ArrowRight: (index) => (index + 1) % panels.length,
  Home: () => 0,
  End: () => panels.length - 1,
};

function choose(event: KeyboardEvent, index: number): void {
  const move = moves[event.key];
  const next = move && panels[move(index)];
  if (!next || event.altKey || event.ctrlKey || event.metaKey) return;
  event.preventDefault();
  showPanel(next);
  document.getElementById(`tab-${next}`)?.focus();
}

/** Brings the chosen tab into sight where the list is wider than its place, without moving the page. */
function useTabInSight(shown: Panel) {
  const list = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const tab = document.getElementById(`tab-${shown}`);
    if (!list.current || !tab) return;
    const { scrollLeft, clientWidth } = list.current;
    const left = tab.offsetLeft - list.current.offsetLeft;
    if (left < scrollLeft) list.current.scrollLeft = left;
    else if (left + tab.offsetWidth > scrollLeft + clientWidth)
      list.current.scrollLeft = left + tab.offsetWidth - clientWidth;
  }, [shown]);
  return list;
}

/** The proof of the price, one subject a tab. */
export function Panels() {
  const { good, stale } = settledAnswer.value;
  const shown = panel.value;
  const { view: View } = contents[shown];
  const list = useTabInSight(shown);
  return (
    <section class="panels" aria-label="Where the price comes from" data-stale={stale}>
      <div ref={list} role="tablist" aria-label="Where the price comes from">
        {panels.map((name, i) => (
          <button
            key={name}
            type="button"
            role="tab"
            id={`tab-${name}`}
            aria-selected={name === shown}
            aria-controls="panel"
            tabIndex={name === shown ? 0 : -1}
            data-label={contents[name].name}
            onClick={() => showPanel(name)}
            onKeyDown={(event) => choose(event, i)}
          >
            {contents[name].name}
          </button>
        ))}
      </div>
      <div role="tabpanel" id="panel" aria-labelledby={`tab-${shown}`} tabIndex={0}>
        {good ? <View request={good.request} result={good.result} /> : <p class="muted">No price yet.</p>}
      </div>
    </section>
  );
}
