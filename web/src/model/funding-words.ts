/** Names of the kinds of funding, in trade words. */
import type { CurveDraft, ModelName } from './draft';

export const modelNames: Readonly<Record<ModelName, string>> = {
  vasicek: 'Vasicek',
  'cox-ingersoll-ross': 'Cox–Ingersoll–Ross',
  'ho-lee': 'Ho–Lee',
  'hull-white': 'Hull–White',
  'policy-meetings': 'Policy meetings',
  scenarios: 'Scenarios',
  samples: 'Pasted samples',
};

export function fundingInWords(curve: CurveDraft): string {
  if (curve.kind === 'flat') return 'Flat rate';
  if (curve.kind === 'pillars') return 'Curve';
  if (curve.kind === 'instruments') return 'Instruments';
  return modelNames[curve.model];
}
