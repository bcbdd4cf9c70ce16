import { Choice, type Option } from './choice';

export const compoundings: readonly Option[] = [
  { value: 'continuous', name: 'continuous' },
  { value: 'simple', name: 'simple' },
  { value: 'annual', name: 'annual' },
  { value: 'semiannual', name: 'semiannual' },
  { value: 'quarterly', name: 'quarterly' },
  { value: 'monthly', name: 'monthly' },
];

export const dayCounts: readonly Option[] = [
  'ACT/360',
  'ACT/365.FIXED',
  'ACT/ACT.ISDA',
  '30/360',
  '30E/360',
  '30E/360.ISDA',
  'ACT/365L',
  'BUS/252',
].map((name) => ({ value: name, name }));

export const interpolations: readonly Option[] = [
  { value: 'log-linear', name: 'flat forward rates (log-linear)' },
  { value: 'linear-zero', name: 'linear zero rates' },
  { value: 'monotone-cubic', name: 'smooth forward rates (monotone cubic)' },
];

/** How a rate is compounded and how its days are counted. */
export function RateConvention({ path, at = `/${path}` }: { readonly path: string; readonly at?: string }) {
  return (
    <div class="field-row">
      <Choice label="Compounding" path={`${path}/compounding`} at={`${at}/compounding`} options={compoundings} />
      <Choice label="Day count" path={`${path}/dayCount`} at={`${at}/dayCount`} options={dayCounts} />
    </div>
  );
}
