import { useRef } from 'preact/hooks';
import { formatDate } from '../format';
import { go, place, places, type Place } from '../model/view';
import { openFile, save } from '../files/open-save';
import { askToPrint } from '../print/options';
import { canRedo, canUndo, redo, undo } from '../store/session';
import { sheetTime } from '../store/sheet-time';

export const placeNames: Readonly<Record<Place, string>> = {
  quote: 'Quote',
  requests: 'Requests',
  agreed: 'Agreed',
  book: 'Book',
  market: 'Market',
};

function SheetLine() {
  const { asOf, time, stale, why, demonstration } = sheetTime.value;
  const when = [asOf === '' ? 'no date' : formatDate(asOf), time].filter((word) => word !== '').join(', ');
  return (
    <p class="sheet-line" title={`Market of ${when}`}>
      {demonstration ? 'Invented market of ' : 'Market of '}
      {when}
      {stale && (
        <>
          {' '}
          <strong class="chip stale-sheet">stale: {why}</strong>
        </>
      )}
    </p>
  );
}

function Actions() {
  const file = useRef<HTMLInputElement>(null);
  return (
    <div class="bar-actions">
      <button type="button" class="quiet" onClick={undo} aria-disabled={!canUndo.value} title="Undo (Ctrl+Z)">
        Undo
      </button>
      <button
        type="button"
        class="quiet wide-only"
        onClick={redo}
        aria-disabled={!canRedo.value}
        title="Redo (Ctrl+Shift+Z)"
      >
        Redo
      </button>
      <button type="button" class="quiet" onClick={() => file.current?.click()} title="Open a file">
        Open
      </button>
      <input
        ref={file}
        type="file"
        accept=".json,application/json"
        hidden
        aria-label="File to open"
        onChange={(event) => {
          const [chosen] = event.currentTarget.files ?? [];
          if (chosen !== undefined) void openFile(chosen);
          event.currentTarget.value = '';
        }}
      />
      <button type="button" class="quiet" onClick={save} title="Save everything to a file (Ctrl+S)">
        Save
      </button>
      <button type="button" class="quiet" onClick={askToPrint} title="Print the quote (Ctrl+P)">
        Print
      </button>
    </div>
  );
}

export function Header() {
  return (
    <header class="bar">
      <span class="brand">Forwright</span>
      <SheetLine />
      <nav class="places" aria-label="Places">
        {places.map((name, index) => (
          <button
            key={name}
            type="button"
            aria-current={place.value === name ? 'page' : undefined}
            aria-keyshortcuts={`Alt+${index + 1}`}
            title={`${placeNames[name]}: ${index + 1}, or Alt+${index + 1} while typing`}
            onClick={() => go(name)}
          >
            {placeNames[name]} <kbd aria-hidden="true">{index + 1}</kbd>
          </button>
        ))}
      </nav>
      <Actions />
    </header>
  );
}
