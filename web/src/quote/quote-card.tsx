import { datesInText, formatNumber } from '../format';
import type { Precision } from '../format';
import { coreTrouble, errors, focusField, quoteAnswer } from '../model/view';
import type { QuoteRequest, QuoteResult, Side } from '../model/view';
import { CopyPrice } from './copy-price';
import { Corridor } from './corridor';
import { Facts, SideFacts } from './facts';
import { clientDoes, pricePrecision, priceInWords, sideName, sides } from './words';

interface Quoted {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
}

/** Why the price on screen is not the one for what is typed, with the way to the field; else that it is indicative. */
function Standing({ stale }: { readonly stale: boolean }) {
  if (coreTrouble.value) return <p class="standing wrong">{coreTrouble.value}</p>;
  if (!stale) return <p class="standing">Indicative until the desk confirms</p>;
  const fault = errors.value.values().next().value;
  return (
    <p class="standing wrong">
      <b>Earlier price.</b> {fault ? datesInText(fault.message) : 'The new one is being worked out.'}{' '}
      {fault && (
        <button type="button" class="link" onClick={() => focusField(fault.at)}>
          Go to it
        </button>
      )}
    </p>
  );
}

/** One side: what we do, what the client does, and the price; where it was not asked for, the break-even only. */
function SidePrice({
  request,
  result,
  side,
  precision,
}: Quoted & { readonly side: Side; readonly precision: Precision }) {
  const price = result.quote[side];
  const figures = formatNumber(price ?? result.breakEven[side], price === null ? precision.between : precision.dealt);
  return (
    <div class={price === null ? 'side side-unasked' : 'side'}>
      <p class="side-name">
        {price === null ? `Break-even ${side}` : <b>{sideName[side]}</b>}
        <span>{price === null ? 'not asked for' : clientDoes[side]}</span>
      </p>
      <p class="price num" style={{ '--figures': Math.max(5, figures.length) }}>
        {figures}
      </p>
      <SideFacts request={request} result={result} side={side} />
    </div>
  );
}

function Card({ request, result, stale }: Quoted & { readonly stale: boolean }) {
  const precision = pricePrecision(request, result);
  return (
    <>
      <div class="quote-head">
        <Standing stale={stale} />
        {!stale && <CopyPrice text={priceInWords(request, result)} />}
      </div>
      <div class="prices">
        {sides.map((side) => (
          <SidePrice key={side} request={request} result={result} side={side} precision={precision} />
        ))}
      </div>
      <Corridor result={result} precision={precision} />
      <Facts request={request} result={result} precision={precision} />
    </>
  );
}

/** Bid and offer, the largest on the page; where they stand; what they mean. It greys when it is not for what is typed. */
export function QuoteCard() {
  const { good, stale, busy } = quoteAnswer.value;
  return (
    <section class="quote" aria-labelledby="quote-name" aria-busy={busy} data-stale={stale}>
      <h2 id="quote-name" class="sr-only">
        Quote
      </h2>
      {good ? (
        <Card request={good.request} result={good.result} stale={stale} />
      ) : (
        <div class="quote-head">
          <Standing stale={errors.value.size > 0} />
        </div>
      )}
    </section>
  );
}
