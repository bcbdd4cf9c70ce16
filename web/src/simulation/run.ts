/**
 * A simulation while it runs: its blocks are shared out over Workers of its own, so that the page and its prices go on,
 * and what the blocks came to is put together by the core. Blocks may be worked out by anyone in any order: the core adds
 * them up in theirs, so the figures are the same to the last bit however many Workers there are.
 */
import { signal } from '@preact/signals';
import { openCore, type Core } from '../core/open';
import type { SimulatedPart, SimulatePartResult, SimulateWholeResult } from '../model/answer';
import type { SimulateRequest } from '../model/request';
import type { Fault } from '../model/view';
import { askFor } from '../store/calculation';

/** What a simulation is asked about: the request of the task, without blocks and parts. */
export type Question = Omit<SimulateRequest, 'blocks' | 'parts' | 'fan'> & { readonly quantity: number };

/** How the estimate came nearer. */
export interface Trail {
  readonly paths: number;
  readonly forward: number;
  /** What holds the truth 95 times in 100; null where it can't be told yet. */
  readonly low: number | null;
  readonly high: number | null;
}

export interface Run {
  readonly state: 'running' | 'stopped' | 'done' | 'failed';
  /** What is simulated: its figures are told in its own currency and on its own quantity. */
  readonly asked: Question;
  /** The same as text, to see whether the sheet has changed since. */
  readonly question: string;
  readonly done: number;
  /** Blocks in all; 0 until the first is worked out. */
  readonly count: number;
  readonly workers: number;
  readonly result: SimulateWholeResult | null;
  readonly trail: readonly Trail[];
  readonly errors: readonly Fault[];
}

export const run = signal<Run | null>(null);

/** A Worker is asked for as many blocks at once as take about so long: stopping then takes no longer either. */
const askedMilliseconds = 60;
/** How often the figures are put together while it runs. */
const shownEachMilliseconds = 150;
const mostWorkers = 8;
/** What is being worked out is waited for so long when one stops; then it is given up, to be done again on going on. */
const stoppingMilliseconds = 400;
/** How long Workers are kept for another run. */
const keptMilliseconds = 30_000;

/** The page's own thread and its core need one processor. */
function workersWanted(): number {
  return Math.max(1, Math.min(mostWorkers, navigator.hardwareConcurrency - 1));
}

let pool: Promise<readonly Core[]> | null = null;

/** Cores of the simulation's own. Where there are no Workers they would hold the page up: there is but one, shared. */
function openPool(): Promise<readonly Core[]> {
  pool ??= (async () => {
    const first = await openCore();
    const more = first.thread === 'worker' ? workersWanted() - 1 : 0;
    return [first, ...(await Promise.all(Array.from({ length: more }, openCore)))];
  })();
  return pool;
}

let keeping: ReturnType<typeof setTimeout> | undefined;

function closePool(): void {
  void pool?.then((cores) => cores.forEach((core) => core.close()));
  pool = null;
}

interface Blocks {
  readonly from: number;
  readonly to: number;
}

interface Answer<Result> {
  readonly ok: boolean;
  readonly result: Result;
  readonly errors: readonly Fault[];
}

/** One simulation, from its start over every stop to its end. */
class Simulation {
  private readonly parts: SimulatedPart[] = [];
  private next = 0;
  /** Blocks given up in stopping. */
  private readonly again: Blocks[] = [];
  private done = 0;
  private count = 1;
  private trail: readonly Trail[] = [];
  private result: SimulateWholeResult | null = null;
  private workers = 0;
  private running = false;
  private stopping = false;
  private errors: readonly Fault[] = [];
  private showing: Promise<void> | null = null;
  private lastShown = 0;

  constructor(
    private readonly question: Question,
    private readonly text: string,
  ) {}

  stop(): void {
    this.stopping = true;
    // Where blocks take long, as they do in plain script, stopping does not.
    setTimeout(() => {
      if (this.stopping && this.running && current === this) closePool();
    }, stoppingMilliseconds);
  }

  async goOn(): Promise<void> {
    clearTimeout(keeping);
    this.stopping = false;
    this.running = true;
    this.tell('running');
    try {
      const cores = await openPool();
      this.workers = cores.length;
      // The first block says how many there are.
      if (this.parts.length === 0 && !this.isStopping() && cores[0] !== undefined) await this.work(cores[0], 1);
      if (this.errors.length === 0) await Promise.all(cores.map((core) => this.workOn(core)));
      // What came in while figures were put together is put together as well.
      while (current === this && (this.showing !== null || this.isBehind())) await this.show();
    } catch {
      this.errors = [{ at: '', code: 'stopped', message: 'The simulation stopped and cannot go on in this browser.' }];
    }
    this.running = false;
    if (current === this) keeping = setTimeout(closePool, keptMilliseconds);
    if (current === this) this.tell(this.errors.length > 0 ? 'failed' : this.done === this.count ? 'done' : 'stopped');
  }

  private async workOn(core: Core): Promise<void> {
    let blocks = 1;
    while (this.isLeft() && !this.stopping && this.errors.length === 0 && current === this) {
      const began = performance.now();
      await this.work(core, blocks);
      const took = performance.now() - began;
      if (took < askedMilliseconds / 2) blocks *= 2;
      else if (took > askedMilliseconds * 2) blocks = Math.max(1, Math.floor(blocks / 2));
      const late = performance.now() - this.lastShown > shownEachMilliseconds;
      if (late || this.done >= 2 * (this.result?.blocks.done ?? 1)) void this.show();
    }
  }

  private async work(core: Core, blocks: number): Promise<void> {
    const { from, to } = this.again.pop() ?? this.following(blocks);
    let text: string;
    try {
      text = await core.answer(JSON.stringify({ ...this.question, blocks: { from, to } }));
    } catch (reason) {
      if (!this.stopping) throw reason;
      this.again.push({ from, to });
      return;
    }
    const answer = JSON.parse(text) as Answer<SimulatePartResult>;
    if (!answer.ok) {
      this.errors = answer.errors;
      return;
    }
    this.parts.push(answer.result.part);
    this.count = answer.result.blocks.count;
    this.done += to - from;
  }

  private isStopping(): boolean {
    return this.stopping;
  }

  private isLeft(): boolean {
    return this.again.length > 0 || this.next < this.count;
  }

  private following(blocks: number): Blocks {
    const from = this.next;
    this.next = Math.min(from + blocks, Math.max(this.count, 1));
    return { from, to: this.next };
  }

  /** Puts together what is there; the fan, which does not hang on the blocks, only once. */
  private show(): Promise<void> {
    this.showing ??= (async () => {
      this.lastShown = performance.now();
      const fan = this.result?.fan;
      const parts = [...this.parts];
      const answer = await askFor<SimulateWholeResult>({ ...this.question, parts, fan: fan === undefined }).finally(
        () => (this.showing = null),
      );
      if (current !== this) return;
      if (!answer.ok) {
        this.errors = answer.errors;
        return;
      }
      const { result } = answer;
      this.result = fan === undefined ? result : { ...result, fan };
      const { paths, estimate, interval95 } = result;
      if (this.trail.at(-1)?.paths !== paths)
        this.trail = [
          ...this.trail,
          { paths, forward: estimate.forward, low: interval95?.low ?? null, high: interval95?.high ?? null },
        ];
      if (this.running) this.tell('running');
    })();
    return this.showing;
  }

  private isBehind(): boolean {
    return this.errors.length === 0 && this.parts.length > 0 && (this.result?.blocks.done ?? 0) < this.done;
  }

  private tell(state: Run['state']): void {
    const { question: asked, text: question, done, workers, result, trail, errors } = this;
    const count = this.parts.length === 0 ? 0 : this.count;
    run.value = { state, asked, question, done, count, workers, result, trail, errors };
  }
}

let current: Simulation | null = null;

/** Begins anew; one that runs is dropped. */
export function begin(question: Question): void {
  current?.stop();
  current = new Simulation(question, JSON.stringify(question));
  void current.goOn();
}

/** Ends after the blocks that are being worked out; what is there stays, and one can go on from it. */
export function stop(): void {
  current?.stop();
}

export function goOn(): void {
  void current?.goOn();
}
