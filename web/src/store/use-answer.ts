import { useEffect, useState } from 'preact/hooks';
import type { Fault } from '../model/view';
import { askFor } from './calculation';

export interface Asked<Result> {
  /** The last good result. */
  readonly result: Result | null;
  readonly errors: readonly Fault[];
  readonly stale: boolean;
}

/** The answer to a question as it changes; an answer to an earlier question is dropped. Null asks nothing. */
export function useAnswer<Result>(question: object | null): Asked<Result> {
  const [asked, setAsked] = useState<Asked<Result>>({ result: null, errors: [], stale: false });
  const text = question === null ? '' : JSON.stringify(question);
  useEffect(() => {
    if (text === '') return undefined;
    let current = true;
    void askFor<Result>(JSON.parse(text) as object).then(
      (answer) => {
        if (!current) return;
        setAsked((before) =>
          answer.ok
            ? { result: answer.result, errors: [], stale: false }
            : { result: before.result, errors: answer.errors, stale: true },
        );
      },
      () => undefined,
    );
    return () => {
      current = false;
    };
  }, [text]);
  return asked;
}
