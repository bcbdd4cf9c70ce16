import { useId, useState } from 'preact/hooks';
import { bind } from '../fields/binding';
import { faultAt } from '../fields/text-input';

/** Texts longer than this are not put into a box to edit: they are counted, and replaced whole. */
const longestEdited = 200_000;

function linesOf(text: string): number {
  return text.trim() === '' ? 0 : text.trim().split('\n').length;
}

/** Simulated discount factors brought from elsewhere. */
export function SamplesEditor({ path, at }: { readonly path: string; readonly at: string }) {
  const id = useId();
  const { text, set } = bind(`${path}/text`);
  const [replacing, setReplacing] = useState(false);
  const fault = faultAt(`${at}/factors`, true) ?? faultAt(`${at}/dates`, true);
  const edited = text.length <= longestEdited || replacing;
  const take = (typed: string): void => {
    setReplacing(false);
    set(typed);
  };
  return (
    <div class="field">
      <label for={id}>Factors: a heading of dates, then one row a path</label>
      {edited ? (
        <textarea
          id={id}
          rows={7}
          spellcheck={false}
          class="num samples"
          value={replacing ? '' : text}
          data-at={`${at}/factors`}
          data-path={`${path}/text`}
          aria-invalid={fault !== null}
          aria-describedby={`${id}-note`}
          onInput={(event) => take(event.currentTarget.value)}
        />
      ) : (
        <div class="row">
          <span id={id}>{linesOf(text) - 1} paths</span>
          <button type="button" class="plain" onClick={() => setReplacing(true)}>
            Replace them
          </button>
        </div>
      )}
      <p class="field-hint" id={`${id}-note`}>
        {fault === null
          ? `${Math.max(0, linesOf(text) - 1)} paths. Paste from a spreadsheet or a file; the factor of each date is the column’s mean.`
          : ''}
      </p>
      {fault !== null && <p class="field-error">{fault.message}</p>}
    </div>
  );
}
