import { Choice, Segmented } from '../fields/choice';
import { Field } from '../fields/field';
import type { CurveDraft, CurveKind } from '../model/draft';
import { models } from '../model/draft';
import { modelNames } from '../model/funding-words';
import { valueOf } from '../store/session';
import { FitEditor } from './fit-editor';
import { FlatEditor } from './flat-editor';
import { InstrumentsEditor } from './instruments-editor';
import { MeetingsEditor } from './meetings-editor';
import { PillarsEditor } from './pillars-editor';
import { SamplesEditor } from './samples-editor';
import { ScenariosEditor } from './scenarios-editor';
import { ShortRateEditor } from './short-rate-editor';

const kinds: readonly { readonly value: CurveKind; readonly name: string }[] = [
  { value: 'flat', name: 'Flat' },
  { value: 'pillars', name: 'Curve' },
  { value: 'instruments', name: 'Instruments' },
  { value: 'random', name: 'Random' },
];

interface CurveEditorProps {
  readonly label: string;
  readonly path: string;
  readonly at: string;
}

function ModelEditor({ path, at, model }: CurveEditorProps & { readonly model: CurveDraft['model'] }) {
  switch (model) {
    case 'vasicek':
      return <ShortRateEditor path={`${path}/vasicek`} at={at} ofTheRoot={false} />;
    case 'cox-ingersoll-ross':
      return <ShortRateEditor path={`${path}/coxIngersollRoss`} at={at} ofTheRoot />;
    case 'ho-lee':
      return (
        <>
          <Field label="Volatility" path={`${path}/hoLee/volatility`} at={`${at}/volatility`} kind="percent" unit="%" />
          <FitEditor curvePath={path} fitPath={`${path}/hoLee/fit`} at={`${at}/fit`} />
        </>
      );
    case 'hull-white':
      return (
        <>
          <div class="field-row">
            <Field
              label="Mean reversion"
              path={`${path}/hullWhite/meanReversion`}
              at={`${at}/meanReversion`}
              kind="plain"
              unit="a year"
            />
            <Field
              label="Volatility"
              path={`${path}/hullWhite/volatility`}
              at={`${at}/volatility`}
              kind="percent"
              unit="%"
            />
          </div>
          <FitEditor curvePath={path} fitPath={`${path}/hullWhite/fit`} at={`${at}/fit`} />
        </>
      );
    case 'policy-meetings':
      return <MeetingsEditor path={`${path}/meetings`} at={at} />;
    case 'scenarios':
      return <ScenariosEditor path={`${path}/scenarios`} at={at} />;
    case 'samples':
      return (
        <>
          <SamplesEditor path={`${path}/samples`} at={at} />
          <FitEditor
            curvePath={path}
            fitPath={`${path}/samples/against`}
            at={`${at}/against`}
            label="Held against the market’s"
            none="nothing"
          />
        </>
      );
  }
}

/** A curve of any kind. Each kind keeps its own draft, so switching to another and back loses nothing. */
export function CurveEditor({ label, path, at }: CurveEditorProps) {
  const curve = valueOf(path) as CurveDraft;
  return (
    <>
      <Segmented label={`${label} is`} path={`${path}/kind`} options={kinds} />
      {curve.kind === 'flat' && <FlatEditor path={`${path}/flat`} at={at} />}
      {curve.kind === 'pillars' && <PillarsEditor path={`${path}/pillars`} at={at} />}
      {curve.kind === 'instruments' && <InstrumentsEditor path={`${path}/instruments`} at={at} />}
      {curve.kind === 'random' && (
        <>
          <Choice
            label="Model"
            path={`${path}/model`}
            at={`${at}/model`}
            options={models.map((value) => ({ value, name: modelNames[value] }))}
          />
          <ModelEditor label={label} path={path} at={at} model={curve.model} />
        </>
      )}
    </>
  );
}
