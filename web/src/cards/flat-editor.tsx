import { RateConvention } from '../fields/conventions';
import { Field } from '../fields/field';

/** One rate for every date. */
export function FlatEditor({ path, at }: { readonly path: string; readonly at: string }) {
  return (
    <>
      <Field label="Rate" path={`${path}/rate`} at={`${at}/rate`} kind="percent" unit="% a year" />
      <RateConvention path={path} at={at} />
    </>
  );
}
