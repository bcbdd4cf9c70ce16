import { useEffect, useRef } from 'preact/hooks';
import { askingToPrint, printOptions } from './options';
import type { PrintOptions } from './options';

function change(part: Partial<PrintOptions>): void {
  printOptions.value = { ...printOptions.value, ...part };
}

/** Whom the sheet is for and what it shows; closed, nothing of it is there. */
export function PrintDialog() {
  const dialog = useRef<HTMLDialogElement>(null);
  const asking = askingToPrint.value;
  const { copyFor, margin, working } = printOptions.value;
  useEffect(() => {
    if (asking) dialog.current?.showModal();
    else dialog.current?.close();
  }, [asking]);

  const close = (): void => {
    askingToPrint.value = false;
  };
  const print = (event: Event): void => {
    event.preventDefault();
    close();
    // The sheet is drawn with the options chosen before the browser takes its picture.
    requestAnimationFrame(() => window.print());
  };

  return (
    <dialog ref={dialog} class="print-dialog" aria-labelledby="print-dialog-name" onClose={close}>
      {asking && (
        <form onSubmit={print}>
          <h2 id="print-dialog-name">Print this quote</h2>
          <fieldset class="segmented">
            <legend class="sr-only">Copy for</legend>
            {(['client', 'desk'] as const).map((value) => (
              <label key={value}>
                <input
                  type="radio"
                  name="copy-for"
                  value={value}
                  checked={copyFor === value}
                  onChange={() => change({ copyFor: value })}
                />
                <span>{value === 'client' ? 'For the client' : 'For the desk'}</span>
              </label>
            ))}
          </fieldset>
          {copyFor === 'client' ? (
            <label class="check">
              <input
                type="checkbox"
                checked={margin}
                onChange={(event) => change({ margin: event.currentTarget.checked })}
              />
              Show our margin, in money and per cent
            </label>
          ) : (
            <p class="muted">The desk’s copy shows break-evens, margin and the working of each side.</p>
          )}
          <label class="check">
            <input
              type="checkbox"
              checked={working}
              onChange={(event) => change({ working: event.currentTarget.checked })}
            />
            {copyFor === 'client' ? 'Show how the fair price is worked out' : 'Show the working'}
          </label>
          <div class="row">
            <button type="submit" class="primary">
              Print
            </button>
            <button type="button" class="plain" onClick={close}>
              Cancel
            </button>
          </div>
        </form>
      )}
    </dialog>
  );
}
