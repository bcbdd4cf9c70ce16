import './style/index.css';
import { render } from 'preact';
import { openCore } from './core/open';
import { keepDraft, keptDraft } from './files/keep';
import { App } from './shell/app';
import { followWishes } from './shell/follow';
import { listenToKeys } from './shell/keys';
import { calculateWith } from './store/calculation';
import { demonstrationDraft } from './store/demonstration';
import { readPreferences } from './store/preferences';
import { startFrom } from './store/session';
import { watchTheClock } from './store/sheet-time';
import { coreKind, coreTrouble, coreVersion, preferences } from './store/signals';

const opening = openCore();

readPreferences();
document.documentElement.lang = 'en';
startFrom(keptDraft() ?? demonstrationDraft(preferences.peek().decimal));
keepDraft();
listenToKeys();
followWishes();
watchTheClock();

const root = document.querySelector<HTMLElement>('#root');
if (root !== null) render(<App />, root);

try {
  const core = await opening;
  if (root !== null) root.dataset['core'] = `${core.kind} ${core.thread}`;
  coreKind.value = core.kind;
  coreVersion.value = core.version;
  calculateWith(core);
} catch {
  coreTrouble.value =
    'This browser runs neither WebAssembly nor the plain script of the calculation, so no price can be worked out here. Another browser will do.';
}
