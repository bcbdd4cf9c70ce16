import { useId } from 'preact/hooks';
import { Field } from '../fields/field';
import { Rows } from '../fields/rows';
import { faultAt, TextInput } from '../fields/text-input';
import { bind } from '../fields/binding';
import type { MeetingRow } from '../model/draft';
import { nextId, sentIndexes } from '../model/draft';
import { edit, valueOf } from '../store/session';

const moveColumns = [
  { name: 'by', label: 'Move', unit: 'bp', holds: 'basis-points', called: ['by', 'move', 'bp', 'change'], size: 6 },
  {
    name: 'probability',
    label: 'Odds',
    unit: '%',
    holds: 'percent',
    called: ['probability', 'odds', 'chance'],
    size: 6,
  },
] as const;

function Meeting({ path, at, number, remove }: { path: string; at: string; number: number; remove: () => void }) {
  const id = useId();
  const own = faultAt(at);
  const fault = faultAt(`${at}/date`) ?? own;
  return (
    <fieldset class="meeting">
      <legend>Meeting {number}</legend>
      <div class="row">
        <div class="field">
          <label for={id}>In force from</label>
          <div class="control">
            <TextInput
              id={id}
              binding={bind(`${path}/date`)}
              at={`${at}/date`}
              kind="date"
              describedBy={fault === null ? undefined : `${id}-error`}
              size={10}
            />
          </div>
        </div>
        <button type="button" class="quiet" onClick={remove}>
          Take out
        </button>
      </div>
      {fault !== null && (
        <p class="field-error" id={`${id}-error`}>
          {fault.message}
        </p>
      )}
      <Rows
        name={`Moves of meeting ${number}`}
        rowName={`Meeting ${number} move`}
        path={`${path}/moves`}
        at={`${at}/moves`}
        columns={moveColumns}
      />
    </fieldset>
  );
}

/** Central-bank meetings: what each may do to the overnight rate, with the odds of each move. */
export function MeetingsEditor({ path, at }: { readonly path: string; readonly at: string }) {
  const rowsPath = `${path}/rows`;
  const rows = (valueOf(rowsPath) ?? []) as readonly MeetingRow[];
  const indexes = sentIndexes(rows);
  const add = (): void => edit(rowsPath, [...rows, { id: nextId(rows), date: '', moves: [] }]);
  const listFault = faultAt(`${at}/meetings`);
  return (
    <>
      <Field
        label="Overnight rate"
        path={`${path}/overnight`}
        at={`${at}/overnight`}
        kind="percent"
        unit="% a year"
        hint="Continuous, ACT/365.FIXED. The odds are risk-neutral and sum to 100 %."
      />
      {rows.map((row, index) => (
        <Meeting
          key={row.id}
          path={`${rowsPath}/${index}`}
          at={`${at}/meetings/${indexes[index] ?? 'new'}`}
          number={index + 1}
          remove={() =>
            edit(
              rowsPath,
              rows.filter((_, place) => place !== index),
            )
          }
        />
      ))}
      {listFault !== null && <p class="field-error">{listFault.message}</p>}
      <div class="row">
        <button type="button" class="plain" onClick={add}>
          Add a meeting
        </button>
      </div>
    </>
  );
}
