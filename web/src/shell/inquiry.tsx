import type { TargetedEvent } from 'preact';
import { bind } from '../fields/binding';
import { goOn } from '../fields/focus';
import { faultAt, TextInput } from '../fields/text-input';
import { formatLongDate, formatNumber } from '../format';
import type { Client } from '../model/answer';
import { quoteAnswer } from '../model/view';
import { draft, edit, inquiry } from '../store/session';
import { addMarket, chooseMarket } from '../store/markets';
import { built } from '../store/calculation';

const clients: readonly { readonly value: Client; readonly name: string }[] = [
  { value: 'two-way', name: 'asks two-way' },
  { value: 'buys', name: 'buys' },
  { value: 'sells', name: 'sells' },
];
const newMarket = ' new';

function onEnter(event: KeyboardEvent): void {
  if (event.key !== 'Enter' || !(event.currentTarget instanceof HTMLElement)) return;
  event.preventDefault();
  goOn(event.currentTarget);
}

function ClientField() {
  return (
    <span class="field field-inline">
      <label class="sr-only" for="inquiry-client">
        What the client does
      </label>
      <select
        id="inquiry-client"
        value={inquiry.value.client}
        data-at="/inquiry/client"
        data-path="inquiry/client"
        onChange={(event: TargetedEvent<HTMLSelectElement>) => edit('inquiry/client', event.currentTarget.value)}
        onKeyDown={onEnter}
      >
        {clients.map(({ value, name }) => (
          <option key={value} value={value}>
            {name}
          </option>
        ))}
      </select>
    </span>
  );
}

function QuantityField() {
  const binding = bind('inquiry/quantity');
  return (
    <span class="field field-inline">
      <label class="sr-only" for="inquiry-quantity">
        Quantity
      </label>
      <TextInput
        id="inquiry-quantity"
        binding={binding}
        at="/inquiry/quantity"
        kind="amount"
        size={Math.max(8, binding.text.length)}
        describedBy="inquiry-errors"
      />
    </span>
  );
}

function AssetField() {
  const { deals, current } = draft.value;
  return (
    <span class="field field-inline">
      <label class="sr-only" for="inquiry-asset">
        Asset
      </label>
      <select
        id="inquiry-asset"
        value={current}
        onChange={(event: TargetedEvent<HTMLSelectElement>) => {
          const { value } = event.currentTarget;
          if (value === newMarket) addMarket();
          else chooseMarket(value);
        }}
        onKeyDown={onEnter}
      >
        {Object.entries(deals).map(([id, { market }]) => (
          <option key={id} value={id}>
            {market.asset.name.trim() || id}
          </option>
        ))}
        <option value={newMarket}>another asset …</option>
      </select>
    </span>
  );
}

function MaturityField() {
  const binding = bind('inquiry/maturity');
  return (
    <span class="field field-inline">
      <label class="sr-only" for="inquiry-maturity">
        Maturity, a date or a tenor
      </label>
      <TextInput
        id="inquiry-maturity"
        binding={binding}
        at="/inquiry/maturity"
        kind="maturity"
        size={Math.max(9, binding.text.length)}
        describedBy="inquiry-dates inquiry-errors"
      />
    </span>
  );
}

/** What the dates were resolved to, and the quantity where it was typed short. */
function Resolved() {
  const { good, stale } = quoteAnswer.value;
  const short = /[a-z]\s*$/i.test(inquiry.value.quantity);
  const quantity: unknown = built.value.request.inquiry.quantity;
  const { dates } = good?.result ?? {};
  return (
    <small class="inquiry-dates" id="inquiry-dates">
      {short && typeof quantity === 'number' && `${formatNumber(quantity)} · `}
      {dates !== undefined && !stale && (
        <>
          {formatLongDate(dates.maturity)} · {dates.days} days · settles {formatLongDate(dates.settlement)}
        </>
      )}
    </small>
  );
}

function Faults({ maturity }: { readonly maturity: boolean }) {
  const places = ['/inquiry/client', '/inquiry/quantity', ...(maturity ? ['/inquiry/maturity'] : [])];
  const faults = places.map((at) => faultAt(at));
  return (
    <span class="inquiry-errors" id="inquiry-errors">
      {faults.map(
        (fault) =>
          fault !== null && (
            <small class="field-error" key={fault.at}>
              {fault.message}
            </small>
          ),
      )}
    </span>
  );
}

interface InquiryProps {
  /** Where the place itself lists the maturities, the sentence leaves its own out. */
  readonly forOneMaturity: boolean;
}

/** The inquiry as one sentence, whose words are its fields. */
export function Inquiry({ forOneMaturity }: InquiryProps) {
  const twoWay = inquiry.value.client === 'two-way';
  return (
    <form class="inquiry area-inquiry" aria-label="Inquiry" onSubmit={(event) => event.preventDefault()}>
      <span class="word">Client</span> <ClientField /> {twoWay && <span class="word">in</span>} <QuantityField />{' '}
      <AssetField />{' '}
      {forOneMaturity ? (
        <>
          <span class="word">for</span> <MaturityField /> <Resolved />
        </>
      ) : (
        <span class="word">at several maturities</span>
      )}
      <Faults maturity={forOneMaturity} />
    </form>
  );
}
