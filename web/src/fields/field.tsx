import { useId } from 'preact/hooks';
import { bind, type Binding } from './binding';
import type { Fault } from '../model/view';
import { faultAt, TextInput, type FieldKind } from './text-input';

export interface FieldProps {
  readonly label: string;
  /** Where its text stands in the deal, as `market/spot/bid`. */
  readonly path: string;
  /** The request member it writes; left out, the same place. */
  readonly at?: string;
  readonly kind: FieldKind;
  readonly unit?: string;
  readonly hint?: string;
  readonly whole?: boolean;
  readonly placeholder?: string;
  /** Where its text stands, where that is not the deal. */
  readonly binding?: Binding;
  /** What is wrong with it, where the quote's own faults do not say. */
  readonly wrong?: Fault | null;
}

/** A labelled input of a card, with its unit, what it means, and what is wrong with it. */
export function Field(props: FieldProps) {
  const { label, path, at = `/${path}`, kind, unit, hint, whole = false, placeholder, binding, wrong } = props;
  const id = useId();
  const fault = wrong === undefined ? faultAt(at, whole) : wrong;
  const notes = [
    unit !== undefined && `${id}-unit`,
    hint !== undefined && `${id}-hint`,
    fault !== null && `${id}-error`,
  ];
  return (
    <div class="field">
      <label for={id}>{label}</label>
      <div class="control">
        <TextInput
          id={id}
          binding={binding ?? bind(path)}
          at={at}
          kind={kind}
          wrong={fault !== null}
          describedBy={notes.filter(Boolean).join(' ') || undefined}
          {...(placeholder === undefined ? {} : { placeholder })}
        />
        {unit !== undefined && (
          <span class="unit" id={`${id}-unit`}>
            {unit}
          </span>
        )}
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
