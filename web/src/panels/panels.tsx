import type { FunctionComponent } from 'preact';
import { Tabs } from '../fields/tabs';
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

/** The proof of the price, one subject a tab. */
export function Panels() {
  const { good, stale } = settledAnswer.value;
  const shown = panel.value;
  const { view: View } = contents[shown];
  return (
    <section class="panels" aria-label="Where the price comes from" data-stale={stale}>
      <Tabs
        label="Where the price comes from"
        prefix="proof"
        shown={shown}
        tabs={panels.map((key) => ({ key, name: contents[key].name }))}
        show={showPanel}
      >
        {good ? <View request={good.request} result={good.result} /> : <p class="muted">No price yet.</p>}
      </Tabs>
    </section>
  );
}
