import type { TargetedKeyboardEvent } from 'preact';
import type { NumberKind } from '../input/quantities';
import { stepDate, stepNumber } from '../input/step';
import { errors, format } from '../model/view';
import type { Fault } from '../model/view';
import { built } from '../store/calculation';
import type { Binding } from './binding';
import { goOn } from './focus';

export type FieldKind = NumberKind | 'text' | 'date' | 'maturity';

export interface TextInputProps {
  readonly id: string;
  readonly binding: Binding;
  /** The request member it writes, as a JSON pointer. */
  readonly at: string;
  readonly kind: FieldKind;
  /** Its name, where no label on screen names it. */
  readonly name?: string;
  /** Whether faults inside the member belong to it too. */
  readonly whole?: boolean;
  /** Whether it is marked as wrong, where its owner knows. */
  readonly wrong?: boolean;
  readonly describedBy?: string | undefined;
  readonly size?: number;
  readonly placeholder?: string;
  readonly onPaste?: (event: ClipboardEvent) => void;
}

/** What is wrong at a member, or, with `whole`, inside it. */
export function faultAt(at: string, whole = false): Fault | null {
  const exact = errors.value.get(at);
  if (exact !== undefined || !whole) return exact ?? null;
  for (const [pointer, fault] of errors.value) if (pointer.startsWith(`${at}/`)) return fault;
  return null;
}

function stepped(text: string, kind: FieldKind, direction: 1 | -1, far: boolean): string | null {
  if (kind === 'text') return null;
  const { decimal, locale } = format.peek();
  if (kind === 'date' || kind === 'maturity')
    return stepDate(text, { locale, after: built.peek().request.market.asOf }, direction, far);
  return stepNumber(text, kind, decimal, direction * (far ? 10 : 1));
}

/** One input: its text is the draft's; arrow keys step it, Enter goes on to the next field. */
export function TextInput(props: TextInputProps) {
  const { id, binding, at, kind, name, whole = false, describedBy, size, placeholder, onPaste } = props;
  const wrong = props.wrong ?? faultAt(at, whole) !== null;

  const onKeyDown = (event: TargetedKeyboardEvent<HTMLInputElement>): void => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Enter') {
      event.preventDefault();
      goOn(event.currentTarget);
    } else if (event.key === 'ArrowUp' || event.key === 'ArrowDown') {
      const text = stepped(binding.text, kind, event.key === 'ArrowUp' ? 1 : -1, event.shiftKey);
      if (text === null) return;
      event.preventDefault();
      binding.set(text);
    }
  };

  return (
    <input
      type="text"
      id={id}
      class={kind === 'text' ? undefined : 'num'}
      value={binding.text}
      size={size}
      placeholder={placeholder}
      autocomplete="off"
      spellcheck={false}
      aria-label={name}
      aria-invalid={wrong}
      aria-describedby={describedBy}
      data-at={at}
      data-path={binding.path}
      onInput={(event) => binding.set(event.currentTarget.value)}
      onKeyDown={onKeyDown}
      onPaste={onPaste}
    />
  );
}
