import { useId } from 'preact/hooks';
import { bind } from './binding';
import { goOn } from './focus';
import { faultAt } from './text-input';

export interface Option {
  readonly value: string;
  readonly name: string;
}

interface ChoiceProps {
  readonly label: string;
  readonly path: string;
  readonly at?: string;
  readonly options: readonly Option[];
  readonly hint?: string;
}

/** A labelled choice of one from a list. */
export function Choice({ label, path, at = `/${path}`, options, hint }: ChoiceProps) {
  const id = useId();
  const { text, set } = bind(path);
  const fault = faultAt(at);
  const known = options.some((option) => option.value === text);
  const notes = [hint !== undefined && `${id}-hint`, fault !== null && `${id}-error`].filter(Boolean).join(' ');
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <div class="control">
        <select
          id={id}
          data-at={at}
          data-path={path}
          value={text}
          aria-invalid={fault !== null}
          aria-describedby={notes || undefined}
          onChange={(event) => set(event.currentTarget.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            event.preventDefault();
            goOn(event.currentTarget);
          }}
        >
          {!known && <option value={text}>{text}</option>}
          {options.map(({ value, name }) => (
            <option key={value} value={value}>
              {name}
            </option>
          ))}
        </select>
      </div>
      {hint !== undefined && (
        <p class="field-hint" id={`${id}-hint`}>
          {hint}
        </p>
      )}
      {fault !== null && (
        <p class="field-error" id={`${id}-error`}>
          {fault.message}
        </p>
      )}
    </div>
  );
}

interface SegmentedProps {
  readonly label: string;
  readonly path: string;
  readonly options: readonly Option[];
}

/** A few choices in one row, all of them in sight. */
export function Segmented({ label, path, options }: SegmentedProps) {
  const id = useId();
  const { text, set } = bind(path);
  return (
    <div class="segmented" role="radiogroup" aria-label={label}>
      {options.map(({ value, name }) => (
        <label key={value}>
          <input
            type="radio"
            name={id}
            data-path={path}
            value={value}
            checked={text === value}
            onChange={() => set(value)}
          />
          <span>{name}</span>
        </label>
      ))}
    </div>
  );
}
