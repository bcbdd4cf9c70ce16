/** Filling the sheet with what is usual, as one step that can be undone; and what has been changed since. */
import type { DealDraft } from '../model/draft';
import { valueAt, withValue } from '../store/paths';
import { draft, replaceDraft } from '../store/session';
import { presets, type Preset } from './presets';

export function presetOf(deal: DealDraft): Preset | null {
  return presets.find(({ id }) => id === deal.market.preset) ?? null;
}

export function applyPreset(id: string): void {
  const before = draft.peek();
  const place = `deals/${before.current}`;
  const preset = presets.find((known) => known.id === id);
  const named = withValue(before, `${place}/market/preset`, id);
  replaceDraft(
    (preset?.usual ?? []).reduce((made, { path, value }) => withValue(made, `${place}/${path}`, value), named),
    'market/preset',
  );
}

/** What no longer is as the preset has it, each once. */
export function editedSince(deal: DealDraft, preset: Preset): readonly string[] {
  const edited = preset.usual.filter(
    ({ path, value }) => JSON.stringify(valueAt(deal, path)) !== JSON.stringify(value),
  );
  return [...new Set(edited.map(({ what }) => what))];
}
