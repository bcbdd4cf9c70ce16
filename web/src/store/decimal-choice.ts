/** The person's choice of decimal sign: every number typed so far is rewritten with it. */
import { withOtherSign } from '../model/number-texts';
import type { Preferences } from '../model/view';
import { chosenDecimal, keepPreferences } from './preferences';
import { draft, startFrom } from './session';
import { preferences } from './signals';

/** What was done before is forgotten with it: it was written with the other sign. */
export function chooseDecimal(sign: Preferences['decimal']): void {
  if (preferences.peek().decimal === sign) return;
  const rewritten = withOtherSign(draft.peek());
  chosenDecimal.value = sign;
  preferences.value = { ...preferences.peek(), decimal: sign };
  startFrom(rewritten);
  keepPreferences();
}
