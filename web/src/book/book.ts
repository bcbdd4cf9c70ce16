/** The book of quotes given, in this browser's own database. */
import { signal } from '@preact/signals';
import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import { ask, lastGoodExchange } from '../store/calculation';
import { coreVersion } from '../store/signals';
import { misfit, type Shape } from '../files/shape';
import { download } from '../files/open-save';
import { formatOf, parseJson } from '../files/state';
import { judge, seal, type QuoteRecord, type Verdict } from './record';

interface BookSchema extends DBSchema {
  quotes: { key: string; value: QuoteRecord; indexes: { givenAt: string } };
}
const databaseName = 'forwright.book.1';
const fileFormat = 'forwright-book/1';

export const records = signal<readonly QuoteRecord[]>([]);
export const verdicts = signal<ReadonlyMap<string, Verdict>>(new Map());
export const bookNews = signal<{ readonly text: string; readonly wrong: boolean } | null>(null);

let database: Promise<IDBPDatabase<BookSchema>> | null = null;

/** Opens the database; another copy of the page that wants a newer one is not kept waiting. */
function opened(): Promise<IDBPDatabase<BookSchema>> {
  database ??= openDB<BookSchema>(databaseName, 1, {
    upgrade: (upgraded) => {
      upgraded.createObjectStore('quotes', { keyPath: 'id' }).createIndex('givenAt', 'givenAt');
    },
    blocking: (_current, _blocked, event) => {
      (event.target as IDBDatabase).close();
      database = null;
    },
    terminated: () => {
      database = null;
    },
  });
  return database;
}

const noBook = 'This browser keeps no book here: save the quote to a file instead.';

export async function readBook(): Promise<void> {
  try {
    const book = await opened();
    records.value = (await book.getAllFromIndex('quotes', 'givenAt')).reverse();
  } catch {
    bookNews.value = { text: noBook, wrong: true };
  }
}

/** Puts the quote on screen into the book. */
export async function giveQuote(): Promise<void> {
  const exchange = lastGoodExchange();
  if (exchange === null) {
    bookNews.value = { text: 'There is no good quote on screen to give: mend what is marked first.', wrong: true };
    return;
  }
  try {
    const book = await opened();
    const kept = await book.getAllFromIndex('quotes', 'givenAt');
    const unsealed = {
      id: crypto.randomUUID(),
      givenAt: new Date().toISOString(),
      version: coreVersion.peek(),
      ...exchange,
      before: kept.at(-1)?.seal ?? '',
    };
    await book.add('quotes', { ...unsealed, seal: await seal(unsealed) });
    await readBook();
    bookNews.value = {
      text: 'Given: the quote is in the book, with everything that makes its number again.',
      wrong: false,
    };
  } catch {
    bookNews.value = { text: noBook, wrong: true };
  }
}

/** Works the recorded request out again and says whether the number is the same and the record unaltered. */
export async function check(record: QuoteRecord): Promise<void> {
  const verdict = await judge(record, ask);
  verdicts.value = new Map(verdicts.peek()).set(record.id, verdict);
}

export function saveBook(): void {
  download('forwright-book.json', JSON.stringify({ format: fileFormat, quotes: records.peek() }, null, 1));
}

const text: Shape = 'text';
const bookShape: Shape = {
  members: {
    format: { oneOf: [fileFormat] },
    quotes: {
      list: {
        members: { id: text, givenAt: text, version: text, request: text, answer: text, before: text, seal: text },
      },
    },
  },
};

/** Adds the quotes of a saved book that are not in this one. */
export async function openBook(file: File): Promise<void> {
  const parsed = parseJson(await file.text());
  const wrong = !parsed.ok
    ? parsed.message
    : formatOf(parsed.value) !== fileFormat
      ? 'This is no book of Forwright.'
      : misfit(parsed.value, bookShape);
  if (wrong !== null || !parsed.ok) {
    bookNews.value = { text: `${file.name} was not opened, and nothing has changed. ${wrong ?? ''}`, wrong: true };
    return;
  }
  try {
    const book = await opened();
    const { quotes } = parsed.value as { quotes: readonly QuoteRecord[] };
    let added = 0;
    for (const quote of quotes) {
      if ((await book.get('quotes', quote.id)) !== undefined) continue;
      await book.add('quotes', quote);
      ++added;
    }
    await readBook();
    bookNews.value = { text: `${added} ${added === 1 ? 'quote' : 'quotes'} added from ${file.name}.`, wrong: false };
  } catch {
    bookNews.value = { text: noBook, wrong: true };
  }
}
