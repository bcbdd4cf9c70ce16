import { Segmented } from '../fields/choice';
import { typed } from '../store/session';
import { FlatEditor } from './flat-editor';
import { PillarsEditor } from './pillars-editor';

interface FitEditorProps {
  /** The whole curve's draft, whose flat rate or points are fitted. */
  readonly curvePath: string;
  /** Where the model's choice stands. */
  readonly fitPath: string;
  readonly at: string;
}

/** The curve that a model is made to agree with: this funding's own flat rate, or its own points. */
export function FitEditor({ curvePath, fitPath, at }: FitEditorProps) {
  return (
    <>
      <div class="field">
        <span class="label">Fitted to</span>
        <Segmented
          label="Fitted to"
          path={fitPath}
          options={[
            { value: 'flat', name: 'The flat rate' },
            { value: 'pillars', name: 'The curve' },
          ]}
        />
      </div>
      {typed(fitPath) === 'flat' ? (
        <FlatEditor path={`${curvePath}/flat`} at={at} />
      ) : (
        <PillarsEditor path={`${curvePath}/pillars`} at={at} />
      )}
    </>
  );
}
