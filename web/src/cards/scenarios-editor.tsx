import { Field } from '../fields/field';
import { faultAt } from '../fields/text-input';
import type { ScenarioRow } from '../model/draft';
import { emptyCurve, nextId } from '../model/draft';
import { edit, valueOf } from '../store/session';
import { CurveEditor } from './curve-editor';

/** Whole curves, each with its weight: the discount factor is their weighted mean. */
export function ScenariosEditor({ path, at }: { readonly path: string; readonly at: string }) {
  const rowsPath = `${path}/rows`;
  const rows = (valueOf(rowsPath) ?? []) as readonly ScenarioRow[];
  const add = (): void => edit(rowsPath, [...rows, { id: nextId(rows), weight: '', curve: emptyCurve }]);
  const listFault = faultAt(`${at}/scenarios`);
  return (
    <>
      {rows.map((row, index) => {
        const place = `${rowsPath}/${index}`;
        const pointer = `${at}/scenarios/${index}`;
        return (
          <fieldset class="scenario" key={row.id}>
            <legend>Scenario {index + 1}</legend>
            <div class="row">
              <Field label="Weight" path={`${place}/weight`} at={`${pointer}/weight`} kind="percent" unit="%" />
              <button
                type="button"
                class="quiet"
                onClick={() =>
                  edit(
                    rowsPath,
                    rows.filter((_, other) => other !== index),
                  )
                }
              >
                Take out
              </button>
            </div>
            <CurveEditor label={`Scenario ${index + 1}`} path={`${place}/curve`} at={`${pointer}/curve`} />
          </fieldset>
        );
      })}
      {listFault !== null && <p class="field-error">{listFault.message}</p>}
      <div class="row">
        <button type="button" class="plain" onClick={add}>
          Add a scenario
        </button>
        <span class="muted">The weights are risk-neutral and sum to 100 %.</span>
      </div>
    </>
  );
}
