import { Bridge } from '../charts/bridge';
import { CarryPath } from '../charts/carry-path';
import { giveQuote } from '../book/book';
import { Cards } from '../cards/cards';
import { quoteAnswer } from '../model/view';
import { Panels } from '../panels/panels';
import { QuoteCard } from '../quote/quote-card';
import { Cautions } from '../shell/cautions';
import { Inquiry } from '../shell/inquiry';

/** What should be known of the quote; where there is nothing, what giving it means. Its room stays the same. */
function Notices() {
  const { good, stale } = quoteAnswer.value;
  if (good === null || stale || good.notices.length === 0)
    return <p class="given-note muted">It goes into the book with everything that makes its number again.</p>;
  return (
    <ul class="given-note notices" aria-label="Notices" tabIndex={0}>
      {good.notices.map((notice) => (
        <li class="notice" key={`${notice.at} ${notice.code}`}>
          {notice.message}
        </li>
      ))}
    </ul>
  );
}

export function QuotePlace() {
  return (
    <main class="place place-quote" id="here">
      <h1 class="sr-only">Quote</h1>
      <Inquiry forOneMaturity />
      <div class="area-quote block">
        <QuoteCard />
        <div class="give">
          <button
            type="button"
            class="plain"
            aria-disabled={quoteAnswer.value.stale || quoteAnswer.value.good === null}
            aria-keyshortcuts="Alt+G"
            title="Alt+G"
            onClick={() => void giveQuote()}
          >
            Give this quote
          </button>
          <Notices />
        </div>
      </div>
      <aside class="market area-market" aria-label="Market">
        <Cards alwaysOpen={false} />
      </aside>
      <div class="pictures area-pictures">
        <CarryPath />
        <Bridge />
      </div>
      <div class="area-panels block">
        <Panels />
        <Cautions />
      </div>
    </main>
  );
}
