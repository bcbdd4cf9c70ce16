import { useId } from 'preact/hooks';
import { deal, edit } from '../store/session';

/** When the market was taken down, and until when it may be used: what the quote names, and when it is called stale. */
export function SheetFields() {
  const id = useId();
  const { madeAt, validUntil } = deal.value;
  return (
    <div class="field-row">
      <div class="field">
        <label for={`${id}-made`}>Taken down at</label>
        <div class="control">
          <input
            id={`${id}-made`}
            type="datetime-local"
            value={madeAt}
            data-path="madeAt"
            onInput={(event) => edit('madeAt', event.currentTarget.value)}
          />
        </div>
      </div>
      <div class="field">
        <label for={`${id}-until`}>May be used until</label>
        <div class="control">
          <input
            id={`${id}-until`}
            type="datetime-local"
            value={validUntil}
            data-path="validUntil"
            onInput={(event) => edit('validUntil', event.currentTarget.value)}
          />
        </div>
      </div>
    </div>
  );
}
