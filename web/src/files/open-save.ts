/** Files out of the page and into it. A file that cannot be used says why, and changes nothing. */
import { signal } from '@preact/signals';
import { notUnderstood, understood, type Parsed } from '../input/parsed';
import type { DealDraft, Draft } from '../model/draft';
import { emptyDeal } from '../model/draft';
import { dealFrom, marketFrom } from '../model/from-request';
import type { Market, QuoteRequest } from '../model/request';
import { buildQuote } from '../model/build';
import { ask, askFor } from '../store/calculation';
import { draft, replaceDraft } from '../store/session';
import { preferences } from '../store/signals';
import { formatOf, isState, parseJson, readState, writeState } from './state';

/** What became of the last file, in a sentence. */
export const fileNews = signal<{ readonly text: string; readonly wrong: boolean } | null>(null);

interface Opened {
  readonly draft: Draft;
  readonly what: string;
}

/** What the contract takes where an inquiry leaves them out. */
const assumedInquiry = { client: 'two-way', quantity: 1 } as const;

/** Hands a text to the person as a file. */
export function download(name: string, text: string): void {
  const link = document.createElement('a');
  link.href = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
}

function stamp(): string {
  const now = new Date();
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}-${two(now.getHours())}${two(now.getMinutes())}`;
}

export function save(): void {
  const name = `forwright-${stamp()}.json`;
  download(name, writeState(draft.peek(), preferences.peek().decimal));
  fileNews.value = { text: `Saved as ${name}.`, wrong: false };
}

/** The core's word on a request that came from a file. */
async function answerable(request: object): Promise<Parsed<null>> {
  const answer = await askFor(request);
  if (answer.ok) return understood(null);
  const [first] = answer.errors;
  const more = answer.errors.length - 1;
  return notUnderstood('damaged', `${first?.at ?? ''}: ${first?.message ?? ''}${more > 0 ? ` And ${more} more.` : ''}`);
}

/** Whether the page's fields say all that a request says: the draft must give the same answer, digit for digit. */
async function isFaithful(request: QuoteRequest, deal: DealDraft): Promise<boolean> {
  const { decimal, locale } = preferences.peek();
  const built = buildQuote(deal, { sign: decimal, locale });
  const [one, two] = await Promise.all(
    [request, built.request].map((asked) => ask(JSON.stringify({ ...asked, want: [] }))),
  );
  return built.faults.length === 0 && one !== undefined && two !== undefined && resultOf(one) === resultOf(two);
}

/** The figures of an answer, without what was assumed on the way. */
function resultOf(answer: string): string {
  return JSON.stringify((JSON.parse(answer) as { result?: unknown }).result);
}

const notAllHasFields = 'The page has no fields for all that stands in it.';

interface Sheet {
  readonly format: string;
  readonly madeAt?: unknown;
  readonly validUntil?: unknown;
  readonly markets?: unknown;
}

/** The markets of a market sheet, each one first answered by the core; what is asked of each is kept from before. */
async function sheetDeals(sheet: Sheet): Promise<Parsed<Record<string, DealDraft>>> {
  const { markets } = sheet;
  if (typeof markets !== 'object' || markets === null || Array.isArray(markets) || Object.keys(markets).length === 0)
    return notUnderstood('damaged', 'This market sheet has no markets.');
  const deals: Record<string, DealDraft> = {};
  for (const [id, market] of Object.entries(markets as Record<string, Market>)) {
    const inquiry = { client: 'two-way', quantity: 1, maturity: '1M' };
    const known = await answerable({ format: 'forwright/1', task: 'quote', market, inquiry, want: [] });
    if (!known.ok)
      return notUnderstood(known.code, `The market “${id}” of this sheet cannot be used. ${known.message}`);
    const name = id.replaceAll('/', ' ');
    deals[name] = {
      ...(draft.peek().deals[name] ?? emptyDeal),
      market: marketFrom(market, preferences.peek().decimal),
      madeAt: typeof sheet.madeAt === 'string' ? sheet.madeAt : '',
      validUntil: typeof sheet.validUntil === 'string' ? sheet.validUntil : '',
      demonstration: false,
    };
  }
  return understood(deals);
}

function withDeals(deals: Readonly<Record<string, DealDraft>>): Draft {
  const now = draft.peek();
  return { ...now, deals: { ...now.deals, ...deals }, current: Object.keys(deals)[0] ?? now.current };
}

/** A quote request as the native program takes it; who asks and for how much may be left out. */
async function openedRequest(request: Partial<QuoteRequest>): Promise<Parsed<Opened>> {
  const known = await answerable(request);
  if (!known.ok) return notUnderstood(known.code, `This request cannot be used. ${known.message}`);
  const { task, market, inquiry } = request;
  if (task !== 'quote' || market === undefined || inquiry === undefined)
    return notUnderstood('not-a-quote', 'This file asks for something else than a quote.');
  const name = market.asset.name?.replaceAll('/', ' ') ?? 'Opened request';
  const whole: QuoteRequest = {
    format: 'forwright/1',
    task,
    market,
    inquiry: { ...assumedInquiry, ...inquiry },
  };
  const deal = dealFrom(whole, preferences.peek().decimal);
  if (!(await isFaithful(whole, deal))) return notUnderstood('no-fields', notAllHasFields);
  return understood({ draft: withDeals({ [name]: deal }), what: name });
}

/** The draft after a file was opened, and what was opened. */
async function opened(text: string): Promise<Parsed<Opened>> {
  const parsed = parseJson(text);
  if (!parsed.ok) return parsed;
  const { value } = parsed;
  if (isState(value)) {
    const state = readState(value, preferences.peek().decimal);
    return state.ok ? understood({ draft: state.value, what: 'everything as it was saved' }) : state;
  }
  if (formatOf(value) === 'forwright-sheet/1') {
    const deals = await sheetDeals(value as Sheet);
    if (!deals.ok) return deals;
    const count = Object.keys(deals.value).length;
    return understood({ draft: withDeals(deals.value), what: count === 1 ? 'one market' : `${count} markets` });
  }
  if (formatOf(value) === 'forwright/1') return openedRequest(value as Partial<QuoteRequest>);
  return notUnderstood('foreign', 'This is no file of Forwright: nothing in it says so.');
}

export async function openFile(file: File): Promise<void> {
  const result = await opened(await file.text());
  if (result.ok) {
    replaceDraft(result.value.draft, 'file');
    fileNews.value = { text: `Opened ${file.name}: ${result.value.what}.`, wrong: false };
  } else {
    fileNews.value = { text: `${file.name} was not opened, and nothing has changed. ${result.message}`, wrong: true };
  }
}
