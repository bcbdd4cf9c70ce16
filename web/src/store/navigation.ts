/** Where the person is: one of five places, one of the panels under the quote, and the field to go to next. */
import { signal } from '@preact/signals';

export const places = ['quote', 'requests', 'agreed', 'book', 'market'] as const;
export type Place = (typeof places)[number];
export const panels = ['working', 'ledger', 'income', 'sensitivities', 'random'] as const;
export type Panel = (typeof panels)[number];

export const requestKinds = ['tenors', 'comparison', 'futures', 'cover'] as const;
export type RequestKind = (typeof requestKinds)[number];

export const requestKind = signal<RequestKind>('tenors');
export const place = signal<Place>('quote');
export const panel = signal<Panel>('working');

/** A field somebody asked to go to; `serial` tells two askings for one field apart. */
export interface FieldWanted {
  readonly pointer: string;
  readonly serial: number;
}
export const fieldWanted = signal<FieldWanted | null>(null);

export function go(to: Place): void {
  place.value = to;
}

export function showPanel(name: Panel): void {
  panel.value = name;
}

/** Opens the card that holds the request member at `pointer` and puts the cursor in its field. */
export function focusField(pointer: string): void {
  fieldWanted.value = { pointer, serial: (fieldWanted.peek()?.serial ?? 0) + 1 };
}
