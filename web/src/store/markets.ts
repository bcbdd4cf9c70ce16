/** The markets at hand: one a name. What is asked of each is kept with it, so that choosing another brings both. */
import { emptyDeal, type DealDraft } from '../model/draft';
import { draft, editDraft, replaceDraft } from './session';
import { dateToText } from '../input/step';

export function chooseMarket(id: string): void {
  editDraft('current', id);
}

function freeName(deals: Readonly<Record<string, DealDraft>>): string {
  for (let number = 1; ; ++number) {
    const name = number === 1 ? 'New asset' : `New asset ${number}`;
    if (deals[name] === undefined) return name;
  }
}

function today(): string {
  const now = new Date();
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}

/** Adds a market with nothing in it but today, and brings it on screen. */
export function addMarket(): void {
  const before = draft.peek();
  const name = freeName(before.deals);
  const market = { ...emptyDeal.market, asOf: dateToText(today()), asset: { ...emptyDeal.market.asset, name } };
  replaceDraft({ ...before, deals: { ...before.deals, [name]: { ...emptyDeal, market } }, current: name }, 'current');
}

/** Takes the market on screen out; the first of those that are left comes on screen. */
export function removeMarket(): void {
  const before = draft.peek();
  const deals = Object.fromEntries(Object.entries(before.deals).filter(([id]) => id !== before.current));
  const [first] = Object.keys(deals);
  if (first === undefined) return;
  const agreed = before.agreed.filter((row) => deals[row.market] !== undefined);
  replaceDraft({ ...before, deals, agreed, current: first }, 'current');
}

/** Puts a whole deal on screen, in place of the market of its name. */
export function bringBack(name: string, deal: DealDraft): void {
  const before = draft.peek();
  const id = name.replaceAll('/', ' ');
  const known = before.deals[id];
  const merged = known === undefined ? deal : { ...deal, madeAt: known.madeAt, validUntil: known.validUntil };
  replaceDraft({ ...before, deals: { ...before.deals, [id]: merged }, current: id }, 'current');
}
