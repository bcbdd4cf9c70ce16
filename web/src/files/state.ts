/** The file that *Save* writes and the text that the browser keeps: everything typed, as typed. */
import type { DecimalSign } from '../input/decimal';
import { notUnderstood, understood, type Parsed } from '../input/parsed';
import type { Draft } from '../model/draft';
import { withOtherSign } from '../model/number-texts';
import { draftShape } from './draft-shape';
import { completed, misfit, type Shape } from './shape';

const format = 'forwright-state/1';

interface Kept {
  readonly format: string;
  readonly decimal: DecimalSign;
  readonly draft: Draft;
}

export function writeState(draft: Draft, decimal: DecimalSign): string {
  const kept: Kept = { format, decimal, draft };
  return JSON.stringify(kept, null, 1);
}

export function parseJson(text: string): Parsed<unknown> {
  try {
    return understood(JSON.parse(text) as unknown);
  } catch {
    return notUnderstood('not-json', 'This is no file of Forwright, or it is damaged: its text is not JSON.');
  }
}

/** The format that a parsed file says it has. */
export function formatOf(value: unknown): string | null {
  if (typeof value !== 'object' || value === null || !('format' in value)) return null;
  return typeof value.format === 'string' ? value.format : null;
}

export function isState(value: unknown): boolean {
  return formatOf(value) === format;
}

const stateShape: Shape = {
  members: { format: { oneOf: [format] }, decimal: { oneOf: ['.', ','] }, draft: draftShape },
};

/** The draft of a file, with its numbers written the person's way. */
export function readState(value: unknown, decimal: DecimalSign): Parsed<Draft> {
  const wrong = misfit(value, stateShape);
  if (wrong !== null) return notUnderstood('damaged', `This file is damaged: ${wrong}`);
  const { draft, decimal: its } = completed(value, stateShape) as Kept;
  if (draft.deals[draft.current] === undefined)
    return notUnderstood('damaged', 'This file is damaged: the market that was on screen is not in it.');
  return understood(its === decimal ? draft : withOtherSign(draft));
}
