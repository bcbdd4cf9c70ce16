import { Segmented } from '../fields/choice';
import { typed } from '../store/session';
import { FlatEditor } from './flat-editor';
import { InstrumentsEditor } from './instruments-editor';
import { PillarsEditor } from './pillars-editor';

interface FitEditorProps {
  /** The whole curve's draft, whose flat rate or points are fitted. */
  readonly curvePath: string;
  /** Where the model's choice stands. */
  readonly fitPath: string;
  readonly at: string;
  /** What the curve is to the model. */
  readonly label?: string;
  /** The choice of none of them, where there is one. */
  readonly none?: string;
}

/** The curve that a model is made to agree with, or held against: this funding's own flat rate, or its own points. */
export function FitEditor({ curvePath, fitPath, at, label = 'Fitted to', none }: FitEditorProps) {
  const chosen = typed(fitPath);
  return (
    <>
      <div class="field">
        <span class="label">{label}</span>
        <Segmented
          label={label}
          path={fitPath}
          options={[
            ...(none === undefined ? [] : [{ value: '', name: none }]),
            { value: 'flat', name: 'The flat rate' },
            { value: 'pillars', name: 'The curve' },
            { value: 'instruments', name: 'The instruments' },
          ]}
        />
      </div>
      {chosen === 'flat' && <FlatEditor path={`${curvePath}/flat`} at={at} />}
      {chosen === 'pillars' && <PillarsEditor path={`${curvePath}/pillars`} at={at} />}
      {chosen === 'instruments' && <InstrumentsEditor path={`${curvePath}/instruments`} at={at} />}
    </>
  );
}
