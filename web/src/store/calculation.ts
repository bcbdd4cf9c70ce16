/**
 * From the draft to the answers on screen. A request goes out with every change; while the core works only the
 * newest waits, and an answer to anything but the newest request is dropped.
 */
import { batch, computed, effect, untracked } from '@preact/signals';
import type { Core } from '../core/open';
import type { Assumed, PathResult, QuoteResult, Remark } from '../model/answer';
import { buildQuote, type Built } from '../model/build';
import { fundingInWords } from '../model/funding-words';
import type { QuoteRequest } from '../model/request';
import type { DealDraft } from '../model/draft';
import type { Fault, Shown } from '../model/view';
import { deal, draft } from './session';
import { beforeSwitch, coreTrouble, faults, pathShown, preferences, quoteSettled, quoteShown } from './signals';

/** How long an answer may take before the page says that it is being worked out. */
const lateMilliseconds = 250;

export const built = computed<Built<QuoteRequest>>(() => {
  const { decimal, locale } = preferences.value;
  return buildQuote(deal.value, { sign: decimal, locale });
});

/** The request as it stands, whether or not it can be answered. */
export const request = computed(() => built.value.request);

interface GoodAnswer<Result> {
  readonly ok: true;
  readonly result: Result;
  readonly notices?: readonly Remark[];
  readonly assumed?: readonly Assumed[];
}
interface BadAnswer {
  readonly ok: false;
  readonly errors: readonly Fault[];
}
type Answered<Result> = GoodAnswer<Result> | BadAnswer;

/** The text of the last good quote's request and answer, as they were: what is kept when the quote is given. */
export interface Exchange {
  readonly request: string;
  readonly answer: string;
}
let lastGood: Exchange | null = null;
export function lastGoodExchange(): Exchange | null {
  return quoteShown.peek().stale ? null : lastGood;
}

let core: Core | null = null;

/** Asks the core anything; the answer as text. */
export async function ask(text: string): Promise<string> {
  if (core === null) throw new Error('The core is not open.');
  return core.answer(text);
}

/** Asks the core for a task and reads the answer. */
export async function askFor<Result>(question: object): Promise<Answered<Result>> {
  return JSON.parse(await ask(JSON.stringify(question))) as Answered<Result>;
}

/** The page's own sentences, which know what may have been meant, take the place of the core's at the same member. */
function byPlace(own: readonly Fault[], fromCore: readonly Fault[]): ReadonlyMap<string, Fault> {
  const found = new Map<string, Fault>();
  for (const fault of [...own, ...fromCore]) if (!found.has(fault.at)) found.set(fault.at, fault);
  return found;
}

function shown<Result>(of: QuoteRequest, answer: GoodAnswer<Result>): Shown<Result> {
  const { result, notices = [], assumed = [] } = answer;
  return { good: { request: of, result, notices, assumed }, stale: false, busy: false };
}

interface Wanted extends Built<QuoteRequest> {
  readonly deal: DealDraft;
  readonly market: string;
}

/** What the funding was at the last good answer, to notice when it is switched. */
let lastQuoted: (Pick<Wanted, 'market' | 'deal' | 'request'> & { readonly result: QuoteResult }) | null = null;

function noteSwitch(wanted: Wanted, result: QuoteResult): void {
  const before = lastQuoted;
  lastQuoted = { market: wanted.market, deal: wanted.deal, request: wanted.request, result };
  if (before === null || before.market !== wanted.market) {
    beforeSwitch.value = null;
    return;
  }
  const was = fundingInWords(before.deal.market.funding.curve);
  const now = fundingInWords(wanted.deal.market.funding.curve);
  if (was !== now) beforeSwitch.value = { request: before.request, result: before.result, was, now };
  else if (before.deal.inquiry !== wanted.deal.inquiry || !sameButFunding(before.deal, wanted.deal))
    beforeSwitch.value = null;
}

function sameButFunding(one: DealDraft, two: DealDraft): boolean {
  const names = Object.keys(one.market) as (keyof DealDraft['market'])[];
  return names.every((name) => name === 'funding' || one.market[name] === two.market[name]);
}

/** How long a page that paints nothing, as one in the background, is waited for. */
const mostPaintMilliseconds = 100;

/** Once what was shown is painted. */
function painted(): Promise<void> {
  return new Promise((done) => {
    const late = setTimeout(done, mostPaintMilliseconds);
    requestAnimationFrame(() => {
      clearTimeout(late);
      setTimeout(done, 0);
    });
  });
}

let working = false;
let next: Wanted | null = null;
/** The newest request, whether or not it has been answered. */
let latest: Wanted | null = null;

/** Prices what is wanted and shows it; false where something newer is wanted by then. */
async function quote(wanted: Wanted): Promise<boolean> {
  const late = setTimeout(() => {
    quoteShown.value = { ...quoteShown.peek(), busy: true };
  }, lateMilliseconds);
  const text = JSON.stringify(wanted.request);
  const answerText = await ask(text).finally(() => clearTimeout(late));
  if (next !== null) return false;
  const answer = JSON.parse(answerText) as Answered<QuoteResult>;
  const own = wanted.faults;
  batch(() => {
    if (answer.ok && own.length === 0) {
      lastGood = { request: text, answer: answerText };
      if (faults.peek().size > 0) faults.value = new Map();
      quoteShown.value = shown(wanted.request, answer);
      noteSwitch(wanted, answer.result);
    } else {
      const anotherMarket = lastQuoted?.market !== wanted.market;
      faults.value = byPlace(own, answer.ok ? [] : answer.errors);
      quoteShown.value = { good: anotherMarket ? null : quoteShown.peek().good, stale: true, busy: false };
      if (anotherMarket) pathShown.value = { good: null, stale: true, busy: false };
    }
  });
  return true;
}

/** What takes longer to work out and to draw than the price, once that is painted. */
async function rest(wanted: Wanted): Promise<void> {
  const { market, inquiry } = wanted.request;
  const { stale } = quoteShown.peek();
  const asked = stale ? null : askFor<PathResult>({ format: 'forwright/1', task: 'path', market, inquiry });
  await painted();
  const answer = await asked;
  if (latest !== wanted) return;
  batch(() => {
    quoteSettled.value = quoteShown.peek();
    pathShown.value =
      answer?.ok === true ? shown(wanted.request, answer) : { good: pathShown.peek().good, stale: true, busy: false };
  });
}

function sayStopped(): void {
  coreTrouble.value =
    'The calculation stopped and could not be started again. What you typed is kept: close this page and open it again.';
}

async function work(): Promise<void> {
  if (working || core === null) return;
  working = true;
  while (next !== null) {
    const wanted = next;
    next = null;
    try {
      if (await quote(wanted)) rest(wanted).catch(sayStopped);
    } catch {
      sayStopped();
    }
  }
  working = false;
}

/** From now on every change is answered by this core. */
export function calculateWith(opened: Core): void {
  core = opened;
  effect(() => {
    const wanted = { ...built.value, deal: deal.value, market: draft.value.current };
    untracked(() => {
      next = wanted;
      latest = wanted;
      void work();
    });
  });
}
