import { Field } from '../fields/field';

interface ShortRateEditorProps {
  readonly path: string;
  readonly at: string;
  /** Vasicek's volatility is of the rate, in per cent; the other's multiplies the root of the rate. */
  readonly ofTheRoot: boolean;
}

/** A short rate that is drawn back to its long run. */
export function ShortRateEditor({ path, at, ofTheRoot }: ShortRateEditorProps) {
  return (
    <>
      <div class="field-row">
        <Field label="Rate now" path={`${path}/r0`} at={`${at}/r0`} kind="percent" unit="%" />
        <Field label="Long run" path={`${path}/longRun`} at={`${at}/longRun`} kind="percent" unit="%" />
      </div>
      <div class="field-row">
        <Field
          label="Mean reversion"
          path={`${path}/meanReversion`}
          at={`${at}/meanReversion`}
          kind="plain"
          unit="a year"
        />
        {ofTheRoot ? (
          <Field label="Volatility, × √rate" path={`${path}/volatility`} at={`${at}/volatility`} kind="plain" />
        ) : (
          <Field label="Volatility" path={`${path}/volatility`} at={`${at}/volatility`} kind="percent" unit="%" />
        )}
      </div>
    </>
  );
}
