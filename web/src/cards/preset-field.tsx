import { useId } from 'preact/hooks';
import { applyPreset, editedSince, presetOf } from '../presets/apply';
import { presets } from '../presets/presets';
import { deal } from '../store/session';

/** Fills the sheet with what is usual in a market, says where that comes from, and what has been changed since. */
export function PresetField() {
  const id = useId();
  const { kind } = deal.value.market.asset;
  const chosen = presetOf(deal.value);
  const fitting = presets.filter((preset) => preset.kinds.includes(kind));
  if (fitting.length === 0) return null;
  const edited = chosen === null ? [] : editedSince(deal.value, chosen);
  return (
    <div class="field">
      <label for={id}>As is usual for</label>
      <select id={id} value={chosen?.id ?? ''} onChange={(event) => applyPreset(event.currentTarget.value)}>
        <option value="">nothing: as typed</option>
        {fitting.map((preset) => (
          <option key={preset.id} value={preset.id}>
            {preset.name}
          </option>
        ))}
      </select>
      {chosen !== null && (
        <>
          {edited.length > 0 && (
            <p class="notice">
              Edited since: {edited.join(', ')}.{' '}
              <button type="button" class="quiet" onClick={() => applyPreset(chosen.id)}>
                Set them again
              </button>
            </p>
          )}
          {chosen.sources.map((source) => (
            <p class="field-hint" key={source}>
              {source}
            </p>
          ))}
        </>
      )}
    </div>
  );
}
