import { useEffect, useState } from 'preact/hooks';
import { formatNumber, precisionOf } from '../format';
import { errors, quoteAnswer } from '../model/view';

/** How long figures must rest before they are read out. */
const restMilliseconds = 900;

function sentence(): string {
  const { good, stale } = quoteAnswer.value;
  const [fault] = errors.value.values();
  if (fault !== undefined) {
    const count = errors.value.size;
    return `No price: ${fault.message}${count > 1 ? ` And ${count - 1} more to mend.` : ''}`;
  }
  if (good === null || stale) return '';
  const { quote, fair } = good.result;
  const { dealt } = precisionOf(good.request.market.asset.tick, fair);
  const side = (name: string, price: number | null): string =>
    price === null ? '' : `${name} ${formatNumber(price, dealt)}`;
  return [side('bid', quote.bid), side('offer', quote.offer)].filter((text) => text !== '').join(', ');
}

/** Reads the price to those who do not see it, politely, once it rests. */
export function Announcer() {
  const [said, say] = useState('');
  const text = sentence();
  useEffect(() => {
    const waiting = setTimeout(() => say(text), restMilliseconds);
    return () => clearTimeout(waiting);
  }, [text]);
  return (
    <p class="sr-only" role="status" aria-live="polite">
      {said}
    </p>
  );
}
