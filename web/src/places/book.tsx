import { useEffect, useRef } from 'preact/hooks';
import { check, giveQuote, openBook, readBook, records, saveBook, verdicts } from '../book/book';
import type { QuoteRecord } from '../book/record';
import { formatDate, formatNumber, precisionOf } from '../format';
import type { QuoteResult } from '../model/answer';
import { dealFrom } from '../model/from-request';
import type { QuoteRequest } from '../model/request';
import { format, go, quoteAnswer } from '../model/view';
import { bringBack } from '../store/markets';

interface Read {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
}

/** The record's texts, read; null where they are no longer what a quote is. */
function readRecord(record: QuoteRecord): Read | null {
  try {
    const request = JSON.parse(record.request) as QuoteRequest;
    const { result } = JSON.parse(record.answer) as { result?: QuoteResult };
    return result === undefined || typeof result.fair !== 'number' ? null : { request, result };
  } catch {
    return null;
  }
}

const clientWords = { 'two-way': 'asks two-way in', buys: 'buys', sells: 'sells' } as const;

function Verdict({ record }: { readonly record: QuoteRecord }) {
  const verdict = verdicts.value.get(record.id);
  const follows = record.before === '' || records.value.some((other) => other.seal === record.before);
  if (verdict === undefined) return <span class="muted">not checked yet</span>;
  return (
    <span class={verdict.intact && verdict.sameAgain ? 'verdict' : 'verdict wrong'}>
      {verdict.intact ? 'Not altered.' : 'This record was altered after it was given.'}{' '}
      {verdict.sameAgain ? 'The same number again, in every digit.' : `Another answer now: ${verdict.difference ?? ''}`}
      {!follows && ' The quote given before it is missing from this book.'}
    </span>
  );
}

function Row({ record }: { readonly record: QuoteRecord }) {
  const read = readRecord(record);
  const given = new Date(record.givenAt);
  const when = given.toLocaleString(format.value.locale, { dateStyle: 'medium', timeStyle: 'short' });
  if (read === null)
    return (
      <tr>
        <th scope="row" class="date">
          {when}
        </th>
        <td colSpan={5}>
          <span class="wrong">This record cannot be read any more: it was altered after it was given.</span>
        </td>
      </tr>
    );
  const { request, result } = read;
  const { asset } = request.market;
  const { dealt } = precisionOf(asset.tick, result.fair);
  const price = (value: number | null): string => (value === null ? '–' : formatNumber(value, dealt));
  return (
    <tr>
      <th scope="row" class="date">
        {when}
      </th>
      <td>
        Client {clientWords[request.inquiry.client]} {formatNumber(request.inquiry.quantity)}{' '}
        {asset.name ?? asset.currency} for {formatDate(result.dates.maturity)}
      </td>
      <td class="num strong">{price(result.quote.bid)}</td>
      <td class="num strong">{price(result.quote.offer)}</td>
      <td>
        <Verdict record={record} />
      </td>
      <td>
        <div class="row">
          <button type="button" class="plain" onClick={() => void check(record)}>
            Same number again
          </button>
          <button
            type="button"
            class="quiet"
            onClick={() => {
              bringBack(asset.name ?? 'From the book', dealFrom(request, format.peek().decimal));
              go('quote');
            }}
          >
            Bring back
          </button>
        </div>
      </td>
    </tr>
  );
}

/** The quotes given, each with everything that makes its number again. */
export function BookPlace() {
  const file = useRef<HTMLInputElement>(null);
  useEffect(() => void readBook(), []);
  const list = records.value;
  return (
    <main class="place place-book" id="here">
      <section class="block">
        <h1>Quotes given</h1>
        <div class="row">
          <button
            type="button"
            class="plain"
            aria-disabled={quoteAnswer.value.stale || quoteAnswer.value.good === null}
            onClick={() => void giveQuote()}
          >
            Give the quote on screen
          </button>
          <button type="button" class="plain" aria-disabled={list.length === 0} onClick={saveBook}>
            Save the book to a file
          </button>
          <button type="button" class="plain" onClick={() => file.current?.click()}>
            Add a saved book
          </button>
          <input
            ref={file}
            type="file"
            accept=".json,application/json"
            hidden
            aria-label="Book to add"
            onChange={(event) => {
              const [chosen] = event.currentTarget.files ?? [];
              if (chosen !== undefined) void openBook(chosen);
              event.currentTarget.value = '';
            }}
          />
        </div>
        <p class="muted">
          The book is kept by this browser for this file. In some browsers a file that was moved or renamed finds an
          empty book: save it to a file first, and add it there.
        </p>
        {list.length === 0 ? (
          <p>No quote was given yet. “Give this quote” beside a price, or Alt+G, puts it here.</p>
        ) : (
          <div class="table-frame" tabIndex={0} role="region" aria-label="Quotes given">
            <table class="table">
              <thead>
                <tr>
                  <th scope="col">Given</th>
                  <th scope="col">Inquiry</th>
                  <th scope="col" class="num">
                    Bid
                  </th>
                  <th scope="col" class="num">
                    Offer
                  </th>
                  <th scope="col">Record</th>
                  <th scope="col">
                    <span class="sr-only">What to do with it</span>
                  </th>
                </tr>
              </thead>
              <tbody>
                {list.map((record) => (
                  <Row key={record.id} record={record} />
                ))}
              </tbody>
            </table>
          </div>
        )}
      </section>
    </main>
  );
}
