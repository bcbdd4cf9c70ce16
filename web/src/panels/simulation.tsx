import { useId } from 'preact/hooks';
import { FactorHistogram } from '../charts/histogram';
import { Plot } from '../charts/plot';
import { bindDraft } from '../fields/binding';
import { Field } from '../fields/field';
import {
  formatDate,
  formatSignificant,
  formatNumber,
  formatPercent,
  formatSigned,
  formatSignedMoney,
  precisionOf,
  timeOf,
} from '../format';
import { readNumber } from '../input/quantities';
import type { RateFan, SimulateWholeResult } from '../model/answer';
import { format } from '../model/view';
import type { QuoteRequest } from '../model/view';
import { unitName } from '../quote/words';
import { begin, goOn, run, stop, type Question, type Run } from '../simulation/run';
import { coreKind } from '../store/signals';

type Method = NonNullable<Question['method']>;

const pathChoices = ['4096', '16384', '65536', '262144', '1048576', '4194304'];

const forwardNames: Readonly<Record<SimulateWholeResult['forwards'][number]['code'], string>> = {
  'closed-form': 'over the average factor, in closed form: the price',
  simulated: 'over the average factor, simulated',
  'average-rate': 'at the average rate',
  'path-by-path': 'path by path, then averaged: no price',
};

function questionOf({ market, inquiry }: QuoteRequest, method: Method, paths: number, seed: number): Question {
  const { maturity, roll, quantity } = inquiry;
  return {
    format: 'forwright/1',
    task: 'simulate',
    market,
    maturity,
    ...(roll === undefined ? {} : { roll }),
    quantity,
    method,
    paths,
    seed,
  };
}

/** Run, stop, go on, and how far it is. */
function Controls({ shown, same, question }: { shown: Run | null; same: boolean; question: Question | null }) {
  const running = shown?.state === 'running';
  const resumes = same && shown?.state === 'stopped';
  const paths = shown?.result?.paths ?? 0;
  const state =
    shown === null
      ? ''
      : running
        ? `${formatNumber(paths)} paths so far`
        : shown.state === 'done'
          ? `Done: ${formatNumber(paths)} paths`
          : shown.state === 'stopped'
            ? `Stopped after ${formatNumber(paths)} paths`
            : 'Failed';
  return (
    <div class="row">
      {running ? (
        <button type="button" class="primary" onClick={stop}>
          Stop
        </button>
      ) : resumes ? (
        <>
          <button type="button" class="primary" onClick={goOn}>
            Go on
          </button>
          <button type="button" class="plain" onClick={() => question !== null && begin(question)}>
            Start again
          </button>
        </>
      ) : (
        <button
          type="button"
          class="primary"
          aria-disabled={question === null}
          onClick={() => question !== null && begin(question)}
        >
          {shown === null ? 'Simulate' : 'Simulate again'}
        </button>
      )}
      {shown !== null && (
        <>
          <progress aria-label="Blocks of paths worked out" value={shown.done} max={Math.max(1, shown.count)} />
          <span class="num" role="status">
            {state}
            {shown.workers > 1 && `, by ${shown.workers} Workers`}
          </span>
        </>
      )}
    </div>
  );
}

/** What a run came to, told in its own currency and on its own quantity. */
interface Ran {
  readonly asked: Question;
  readonly whole: SimulateWholeResult;
  /** Decimals of a forward. */
  readonly digits: number;
}

function SideBySide({ asked, whole, digits }: Ran) {
  const { currency } = asked.market.asset;
  return (
    <div class="frame" role="region" aria-label="The forward reckoned in four ways" tabIndex={0}>
      <table class="table long-names">
        <thead>
          <tr>
            <th scope="col">The forward reckoned</th>
            <th scope="col" class="num">
              Fair forward
            </th>
            <th scope="col" class="num">
              Difference
            </th>
            <th scope="col" class="num">
              On {formatNumber(asked.quantity)} {unitName(asked)}
            </th>
          </tr>
        </thead>
        <tbody>
          {whole.forwards.map(({ code, forward, difference, onQuantity, errorOnQuantity }) => (
            <tr key={code}>
              <th scope="row">{forwardNames[code]}</th>
              <td class="num strong">{forward === null ? 'beyond numbers' : formatNumber(forward, digits)}</td>
              <td class="num">
                {difference === null || code === 'closed-form' ? '' : formatSigned(difference, digits)}
              </td>
              <td class="num">
                {onQuantity === null || code === 'closed-form' ? '' : formatSignedMoney(onQuantity, currency)}
                {errorOnQuantity !== undefined && <small> ± {formatSignificant(errorOnQuantity, 2)}</small>}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** Decimals that tell two figures so far apart from each other, never fewer than `least`. */
function decimalsToTell(apart: number, least: number): number {
  return apart > 0 ? Math.min(12, Math.max(least, 1 - Math.floor(Math.log10(apart)))) : least;
}

function Closing({ trail, whole, digits }: Omit<Ran, 'asked'> & { readonly trail: Run['trail'] }) {
  const known = trail.filter(({ low, high }) => low !== null && high !== null);
  if (known.length < 2) return null;
  const ends = known.flatMap(({ low, high }) => [low ?? 0, high ?? 0]);
  const decimals = decimalsToTell(Math.max(...ends) - Math.min(...ends), digits);
  return (
    <Plot
      name="Closing on the closed form"
      axis="number"
      xs={known.map(({ paths }) => paths)}
      xName="Paths"
      xText={(paths) => `${formatNumber(paths, 0)} paths`}
      yText={(value) => formatNumber(value, decimals)}
      bands={[
        {
          name: '95 in 100',
          weight: 1,
          low: known.map(({ low }) => low ?? 0),
          high: known.map(({ high }) => high ?? 0),
        },
      ]}
      lines={[{ name: 'simulated', look: 'main', values: known.map(({ forward }) => forward) }]}
      levels={[{ name: 'closed form', value: whole.closedForm.forward }]}
      legend="Line: the simulated forward. Band: holds the truth 95 times in 100. Level: the closed form."
    />
  );
}

function Fan({ fan }: { readonly fan: RateFan }) {
  const { steps, probabilities, by, paths, drawn } = fan;
  const middle = steps.map(({ from, to }) => (timeOf(from) + timeOf(to)) / 2);
  const at = (probability: number): readonly number[] => {
    const index = probabilities.findIndex((known) => Math.abs(known - probability) < 1e-9);
    return steps.map(({ rates }) => rates[index] ?? 0);
  };
  const when = new Map(steps.map(({ from, to }, i) => [middle[i], `${formatDate(from)} to ${formatDate(to)}`]));
  return (
    <Plot
      name="Where rates may go"
      axis="date"
      xs={middle}
      xName="Average rate over"
      xText={(x) => when.get(x) ?? ''}
      yText={(rate) => formatPercent(rate)}
      leastRange={0.002}
      bands={[
        { name: '98 in 100', weight: 0, low: at(0.01), high: at(0.99) },
        { name: '9 in 10', weight: 1, low: at(0.05), high: at(0.95) },
        { name: '1 in 2', weight: 2, low: at(0.25), high: at(0.75) },
      ]}
      lines={[{ name: 'middle', look: 'main', values: at(0.5) }]}
      traces={drawn}
      rest={steps.length - 1}
      legend={
        by === 'closed-form'
          ? 'The short rate averaged over each step, in closed form. Thin: single paths.'
          : `The short rate averaged over each step, from ${formatNumber(paths ?? 0)} paths. Thin: some of them.`
      }
    />
  );
}

/** How far the simulation lies from the closed form, as a sentence. */
function apartInWords(apart: number | null): string {
  if (apart === null) return '';
  const size = formatNumber(Math.abs(apart), 1);
  return `, ${size} of its standard errors ${apart < 0 ? 'below' : 'above'} the closed form`;
}

function Outcome({ shown, stale }: { readonly shown: Run; readonly stale: boolean }) {
  const { result: whole, asked, trail } = shown;
  if (whole === null) return null;
  const { estimate, standardError, closedForm, apart, interval95, pathBias, histogram, fan } = whole;
  const digits = precisionOf(asked.market.asset.tick, closedForm.forward).between + 4;
  const decimals = interval95 ? decimalsToTell(interval95.high - interval95.low, digits) : digits;
  const marks = [
    { name: 'expected', value: closedForm.factor },
    { name: 'at average rate', value: whole.averageRateFactor },
  ];
  return (
    <div class="random" data-stale={stale}>
      {stale && <p class="notice">The sheet has changed since: simulate again to see it for what stands there now.</p>}
      <p>
        Simulated factor <b class="num">{formatNumber(estimate.factor, 9)}</b>
        {standardError.factor !== null && (
          <>
            {' '}
            ± <span class="num">{formatSignificant(standardError.factor, 2)}</span>
          </>
        )}
        , in closed form <span class="num">{formatNumber(closedForm.factor, 9)}</span>. Simulated forward{' '}
        <b class="num">{formatNumber(estimate.forward, decimals)}</b>
        {interval95 && (
          <>
            , between <span class="num">{formatNumber(interval95.low, decimals)}</span> and{' '}
            <span class="num">{formatNumber(interval95.high, decimals)}</span> with 95 % confidence
          </>
        )}
        {apartInWords(apart.forward)}.
        {pathBias > 0 && (
          <>
            {' '}
            The steps of this model’s paths may put the factor off by up to {formatPercent(pathBias, 4)} of itself; how
            they spread is near the law, not exact.
          </>
        )}
      </p>
      <SideBySide asked={asked} whole={whole} digits={digits} />
      <div class="pictures">
        <FactorHistogram histogram={histogram} marks={marks} when={formatDate(whole.settlement)} />
        {fan && <Fan fan={fan} />}
        <Closing trail={trail} whole={whole} digits={digits} />
      </div>
    </div>
  );
}

/** The random discount factor and the forward by simulation, run while one looks on. */
export function SimulationView({ request }: { readonly request: QuoteRequest }) {
  const methodId = useId();
  const pathsId = useId();
  const method = bindDraft('analysis/simulation/method');
  const paths = bindDraft('analysis/simulation/paths');
  const seed = bindDraft('analysis/simulation/seed');
  const seedRead = readNumber(seed.text, 'count', format.value.decimal);
  const shown = run.value;
  const question = seedRead.ok ? questionOf(request, method.text as Method, Number(paths.text), seedRead.value) : null;
  const same = shown !== null && question !== null && shown.question === JSON.stringify(question);
  return (
    <section class="random" aria-label="By simulation">
      <h4>By simulation</h4>
      <div class="field-row simulation-fields">
        <div class="field">
          <label for={methodId}>Random numbers</label>
          <select id={methodId} value={method.text} onChange={(event) => method.set(event.currentTarget.value)}>
            <option value="quasi">evenly spread (Sobol)</option>
            <option value="pseudo">independent (Philox)</option>
          </select>
        </div>
        <div class="field">
          <label for={pathsId}>Paths</label>
          <select id={pathsId} value={paths.text} onChange={(event) => paths.set(event.currentTarget.value)}>
            {pathChoices.map((count) => (
              <option key={count} value={count}>
                {formatNumber(Number(count))}
              </option>
            ))}
          </select>
        </div>
        <Field
          label="Seed"
          path={seed.path}
          kind="count"
          binding={seed}
          wrong={seedRead.ok ? null : { at: '/seed', code: seedRead.code, message: seedRead.message }}
        />
      </div>
      {coreKind.value === 'plain' && (
        <p class="muted">
          WebAssembly is switched off in this browser, so paths take some thirty times as long: begin with few.
        </p>
      )}
      <Controls shown={shown} same={same} question={question} />
      {shown?.errors.map((fault) => (
        <p key={`${fault.at} ${fault.code}`} class="notice wrong">
          {fault.message}
        </p>
      ))}
      {shown !== null && <Outcome shown={shown} stale={!same} />}
    </section>
  );
}
