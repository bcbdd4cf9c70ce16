import type { Side } from '../model/view';

const names: Readonly<Record<string, string>> = {
  spot: 'Spot',
  funding: 'Funding',
  fee: 'Lending fee',
  yield: 'Yield',
  proportional: 'Proportional income',
  cash: 'Cash income',
  base: 'Base currency',
  fair: 'Fair',
  margin: 'Margin',
  rounding: 'Rounding to tick',
};

/** What a part of the bridge is called; a part without a name of its own by its code. */
export function bridgeName(code: string, side: Side): string {
  if (code === 'side') return side === 'bid' ? 'To the bid side' : 'To the offer side';
  if (code === 'quote') return side === 'bid' ? 'Our bid' : 'Our offer';
  return names[code] ?? code.charAt(0).toUpperCase() + code.slice(1).replaceAll('-', ' ');
}
