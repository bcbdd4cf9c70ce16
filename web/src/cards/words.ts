/** Summaries of what stands in a card, from its texts as typed. */
import type { CurveDraft, FundingDraft, RateDraft } from '../model/draft';
import { isBlank } from '../model/draft';

/** A text, or a dash where nothing stands. */
export function said(text: string, unit = ''): string {
  const typed = text.trim();
  if (typed === '') return '–';
  return unit === '' || /[%a-z]$/i.test(typed) ? typed : `${typed} ${unit}`;
}

export function twoSides(bid: string, offer: string, unit = ''): string {
  if (bid.trim() === '' && offer.trim() === '') return 'none';
  return bid.trim() === offer.trim() ? said(bid, unit) : `${said(bid)} / ${said(offer, unit)}`;
}

function rateWords(rate: RateDraft): string {
  return `${rate.compounding}, ${rate.dayCount}`;
}

function points(curve: Pick<CurveDraft, 'pillars'>): string {
  const rows = curve.pillars.rows.filter((row) => !isBlank(row));
  const unit = curve.pillars.quote === 'zero' ? '%' : '';
  const [first] = rows;
  const last = rows.at(-1);
  if (first === undefined || last === undefined) return 'no points yet';
  if (first === last) return `${said(first.value, unit)} at ${first.at}`;
  return `${said(first.value, unit)} at ${first.at} to ${said(last.value, unit)} at ${last.at}`;
}

function instrumentWords({ rows, turns }: CurveDraft['instruments']): string {
  const filled = rows.filter((row) => !isBlank(row));
  const last = filled.at(-1);
  if (last === undefined) return 'no instruments yet';
  const count = filled.length === 1 ? '1 instrument' : `${filled.length} instruments`;
  const turned = turns.filter((row) => !isBlank(row)).length;
  return `${count} to ${last.tenor}${turned === 0 ? '' : turned === 1 ? ', 1 turn' : `, ${turned} turns`}`;
}

/** What a curve is, in a line. */
export function curveWords(curve: CurveDraft): string {
  if (curve.kind === 'flat') return rateWords(curve.flat);
  if (curve.kind === 'pillars') return points(curve);
  if (curve.kind === 'instruments') return instrumentWords(curve.instruments);
  switch (curve.model) {
    case 'vasicek':
      return `from ${said(curve.vasicek.r0, '%')} to ${said(curve.vasicek.longRun, '%')}, volatility ${said(curve.vasicek.volatility, '%')}`;
    case 'cox-ingersoll-ross':
      return `from ${said(curve.coxIngersollRoss.r0, '%')} to ${said(curve.coxIngersollRoss.longRun, '%')}, volatility ${said(curve.coxIngersollRoss.volatility)}`;
    case 'ho-lee':
      return `volatility ${said(curve.hoLee.volatility, '%')}, fitted to the ${curve.hoLee.fit === 'flat' ? 'flat rate' : 'curve'}`;
    case 'hull-white':
      return `volatility ${said(curve.hullWhite.volatility, '%')}, fitted to the ${curve.hullWhite.fit === 'flat' ? 'flat rate' : 'curve'}`;
    case 'policy-meetings': {
      const count = curve.meetings.rows.length;
      return `${said(curve.meetings.overnight, '%')} overnight, ${count} ${count === 1 ? 'meeting' : 'meetings'}`;
    }
    case 'scenarios': {
      const count = curve.scenarios.rows.length;
      return `${count} ${count === 1 ? 'scenario' : 'scenarios'}, weighted`;
    }
    case 'samples':
      return curve.samples.text.trim() === '' ? 'nothing pasted yet' : 'simulated factors, as pasted';
  }
}

/** The level of a curve where one figure says it, else what kind it is. */
export function curveValue(curve: CurveDraft, kindName: string): string {
  return curve.kind === 'flat' ? said(curve.flat.rate, '%') : kindName;
}

export function spreadWords({ lendSpread, borrowSpread }: Pick<FundingDraft, 'lendSpread' | 'borrowSpread'>): string {
  if (lendSpread.trim() === '' && borrowSpread.trim() === '') return 'no spreads';
  return `lend ${said(lendSpread, 'bp')}, borrow ${said(borrowSpread, 'bp')}`;
}
