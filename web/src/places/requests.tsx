import type { FunctionComponent } from 'preact';
import { Tabs } from '../fields/tabs';
import { requestKind, requestKinds, type RequestKind } from '../store/navigation';
import { Comparison } from '../requests/comparison';
import { Cover } from '../requests/cover';
import { Futures } from '../requests/futures';
import { Tenors } from '../requests/tenors';
import { Cautions } from '../shell/cautions';
import { Inquiry } from '../shell/inquiry';

interface Content {
  readonly name: string;
  readonly view: FunctionComponent;
  /** Whether it is about the one maturity of the inquiry. */
  readonly ofOneMaturity: boolean;
}

/** One line a request: a new one is added here and in the list of kinds. */
const contents: Readonly<Record<RequestKind, Content>> = {
  tenors: { name: 'By maturity', view: Tenors, ofOneMaturity: false },
  comparison: { name: 'By funding', view: Comparison, ofOneMaturity: true },
  futures: { name: 'Futures', view: Futures, ofOneMaturity: true },
  cover: { name: 'Hedge cover', view: Cover, ofOneMaturity: true },
};

/** What a client or the desk may ask beyond one price. */
export function RequestsPlace() {
  const shown = requestKind.value;
  const { view: View, ofOneMaturity } = contents[shown];
  return (
    <main class="place place-requests" id="here">
      <h1 class="sr-only">Requests</h1>
      <Inquiry forOneMaturity={ofOneMaturity} />
      <section class="block panels">
        <Tabs
          label="Requests"
          prefix="request"
          shown={shown}
          tabs={requestKinds.map((kind) => ({ key: kind, name: contents[kind].name }))}
          show={(kind) => (requestKind.value = kind)}
        >
          <View />
        </Tabs>
        <Cautions />
      </section>
    </main>
  );
}
