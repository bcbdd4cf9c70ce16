import { datesInText, formatDate, formatFigures, formatNumber, formatSigned, isIsoDate, thinSpace } from '../format';
import type { Precision } from '../format';
import type { QuoteRequest, QuoteResult, WorkingStep } from '../model/view';
import { pricePrecision } from '../quote/words';
import { Formula } from './formula-view';

const groups = [
  ['dates', 'Dates'],
  ['fair', 'Fair price'],
  ['bid', 'Break-even bid'],
  ['offer', 'Break-even offer'],
  ['quote', 'Quote'],
] as const;

interface Money {
  readonly currency: string;
  readonly precision: Precision;
}

/** A figure of the working: a date, an amount with two decimals more than the price, a rate in per cent, or a number; all to nine figures at most. */
function figure(value: number | string, unit: string, { currency, precision }: Money): string {
  if (typeof value === 'string') return isIsoDate(value) ? formatDate(value) : value;
  if (unit === currency) return formatNumber(value, precision.between + 2);
  return isYearly(unit) ? `${formatFigures(value * 100)}${thinSpace}%` : formatFigures(value);
}

function isYearly(unit: string): boolean {
  return unit.startsWith('a year');
}

function Given({ given, money }: { readonly given: WorkingStep['given']; readonly money: Money }) {
  if (given.length === 0) return null;
  return (
    <p class="given">
      {given.map(({ symbol, value, unit }) => (
        <span key={symbol}>
          <Formula text={symbol} /> = <span class="num">{figure(value, unit, money)}</span>
          {unit && unit !== money.currency && ` ${unit.replaceAll('-', ' ')}`}
        </span>
      ))}
    </p>
  );
}

function Step({ step, money }: { readonly step: WorkingStep; readonly money: Money }) {
  return (
    <li class="step">
      <p class="step-name">
        {step.name}
        <small>{datesInText(step.convention)}</small>
      </p>
      <div class="step-sum">
        <Formula text={step.formula} alone />
        <Given given={step.given} money={money} />
      </div>
      <p class="step-result num">
        <b>{figure(step.result, step.unit, money)}</b>
        {step.effect !== null && (
          <small>
            {formatSigned(step.effect, money.precision.between + 2)}
            <span class="sr-only"> to the forward</span>
          </small>
        )}
      </p>
    </li>
  );
}

function Group({
  name,
  steps,
  money,
  folded,
}: {
  readonly name: string;
  readonly steps: readonly WorkingStep[];
  readonly money: Money;
  readonly folded: boolean;
}) {
  const list = (
    <ol class="steps">
      {steps.map((step, i) => (
        <Step key={`${step.code} ${i}`} step={step} money={money} />
      ))}
    </ol>
  );
  const last = steps.at(-1);
  if (folded && last)
    return (
      <details class="step-group">
        <summary>
          <h4>{name}</h4>
          <span class="muted">the same steps with this side’s inputs</span>
          <b class="num">{figure(last.result, last.unit, money)}</b>
        </summary>
        {list}
      </details>
    );
  return (
    <section class="step-group">
      <h4>{name}</h4>
      {list}
    </section>
  );
}

interface Props {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
  /** On paper everything is open. */
  readonly unfolded?: boolean;
}

/** Every figure of the price in order, each with its formula, what was put in, its convention and what it does to the forward. */
export function Working({ request, result, unfolded = false }: Props) {
  const steps = result.working ?? [];
  const money = { currency: request.market.asset.currency, precision: pricePrecision(request, result) };
  const present = groups
    .map(([side, name]) => ({ side, name, steps: steps.filter((step) => step.side === side) }))
    .filter((group) => group.steps.length > 0);
  return (
    <div class="working">
      {present.map(({ side, name, steps: own }) => (
        <Group
          key={side}
          name={name}
          steps={own}
          money={money}
          folded={!unfolded && (side === 'bid' || side === 'offer')}
        />
      ))}
    </div>
  );
}
