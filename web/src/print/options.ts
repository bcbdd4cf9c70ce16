import { signal } from '@preact/signals';

/** What a printed sheet shows. For the client our margin, and what gives it away, is left out unless it is chosen. */
export interface PrintOptions {
  readonly copyFor: 'client' | 'desk';
  readonly margin: boolean;
  readonly working: boolean;
}

export const printOptions = signal<PrintOptions>({ copyFor: 'client', margin: false, working: true });
/** Whether the person is being asked what to print. */
export const askingToPrint = signal(false);

/** Asks what the sheet is to show, then prints. */
export function askToPrint(): void {
  askingToPrint.value = true;
}
