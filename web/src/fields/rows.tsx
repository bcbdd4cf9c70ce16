import { useId } from 'preact/hooks';
import { readRows, type Column } from '../input/pasted-rows';
import { isBlank, nextId, sentIndexes } from '../model/draft';
import { errors, format } from '../model/view';
import { built } from '../store/calculation';
import { edit, valueOf } from '../store/session';
import { faultAt, TextInput } from './text-input';

export interface RowColumn extends Column {
  readonly label: string;
  readonly unit?: string;
  /** How many figures it usually has. */
  readonly size?: number;
  /** Shown only where a row has something in it, as pasted or opened rows may. */
  readonly rare?: boolean;
}

type Row = Readonly<Record<string, string>> & { readonly id: number };

interface RowsProps {
  readonly name: string;
  /** What one row is called, as `Dividend`. */
  readonly rowName: string;
  readonly path: string;
  readonly at: string;
  readonly columns: readonly RowColumn[];
  /** How many members of the request's list come before the rows. */
  readonly before?: number;
  /** What a row has beside its columns, where nothing has been typed yet. */
  readonly rest?: Readonly<Record<string, string>>;
}

function blankRow(columns: readonly RowColumn[], rest: Readonly<Record<string, string>>, id: number): Row {
  return { ...rest, ...Object.fromEntries(columns.map(({ name }) => [name, ''])), id } as unknown as Row;
}

/** What is wrong in a row, each with the column's name. */
function rowFaults(at: string, columns: readonly RowColumn[]): readonly string[] {
  const found: string[] = [];
  for (const [pointer, fault] of errors.value) {
    if (pointer !== at && !pointer.startsWith(`${at}/`)) continue;
    const column = columns.find(({ name }) => pointer === `${at}/${name}`);
    found.push(column === undefined ? fault.message : `${column.label}: ${fault.message}`);
  }
  return found;
}

/** A table of inputs: typing in its last row, which is blank, adds one; rows copied from a spreadsheet paste into any cell. */
export function Rows({ name, rowName, path, at, columns: all, before = 0, rest = {} }: RowsProps) {
  const id = useId();
  const rows = (valueOf(path) ?? []) as readonly Row[];
  const columns = all.filter(
    (column) => column.rare !== true || rows.some((row) => (row[column.name] ?? '').trim() !== ''),
  );
  const indexes = sentIndexes(rows);
  const shown = [...rows, blankRow(all, rest, nextId(rows))];
  const listFault = faultAt(at);

  const setCell = (index: number, column: string, text: string): void => {
    if (index < rows.length) edit(`${path}/${index}/${column}`, text);
    else edit(path, [...rows, { ...shown[index], [column]: text }]);
  };
  const remove = (index: number): void =>
    edit(
      path,
      rows.filter((_, place) => place !== index),
    );

  const paste = (index: number) => (event: ClipboardEvent) => {
    const text = event.clipboardData?.getData('text/plain') ?? '';
    if (!/[\t\n]/.test(text.trim())) return;
    event.preventDefault();
    const { decimal, locale } = format.peek();
    const pasted = readRows(text, all, { locale, after: built.peek().request.market.asOf }, decimal);
    const first = nextId(rows);
    const added = pasted.map((cells, place) => ({ ...rest, ...cells, id: first + place }));
    const before = rows.slice(0, index).filter((row) => !isBlank(row));
    const after = rows.slice(index).filter((row) => !isBlank(row));
    edit(path, [...before, ...added, ...after]);
  };

  return (
    <div class="rows-frame">
      <table class="rows" aria-label={name}>
        <thead>
          <tr>
            {columns.map((column) => (
              <th key={column.name} scope="col">
                {column.label}
                {column.unit !== undefined && <span class="unit"> {column.unit}</span>}
              </th>
            ))}
            <th>
              <span class="sr-only">Take out</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {shown.map((row, index) => {
            const sent = indexes[index] ?? null;
            const rowAt = sent === null ? '' : `${at}/${sent + before}`;
            const faults = sent === null ? [] : rowFaults(rowAt, all);
            const faultId = `${id}-${row.id}`;
            return [
              <tr key={row.id}>
                {columns.map((column) => (
                  <td key={column.name} style={{ '--figures': column.size ?? 6 }}>
                    <TextInput
                      id={`${id}-${row.id}-${column.name}`}
                      name={`${rowName} ${index + 1}, ${column.label}`}
                      binding={{
                        path: `${path}/${index}/${column.name}`,
                        text: row[column.name] ?? '',
                        set: (text) => setCell(index, column.name, text),
                      }}
                      at={sent === null ? `${at}/new/${column.name}` : `${rowAt}/${column.name}`}
                      kind={column.holds === 'date-or-tenor' ? 'maturity' : column.holds}
                      describedBy={faults.length > 0 ? faultId : undefined}
                      onPaste={paste(index)}
                    />
                  </td>
                ))}
                <td>
                  {index < rows.length && (
                    <button
                      type="button"
                      class="quiet remove"
                      aria-label={`Take out ${rowName.toLowerCase()} ${index + 1}`}
                      onClick={() => remove(index)}
                    >
                      ×
                    </button>
                  )}
                </td>
              </tr>,
              faults.length > 0 && (
                <tr key={`${row.id}-faults`}>
                  <td class="row-error" id={faultId} colSpan={columns.length + 1}>
                    {faults.join(' ')}
                  </td>
                </tr>
              ),
            ];
          })}
        </tbody>
      </table>
      {listFault !== null && <p class="field-error">{listFault.message}</p>}
    </div>
  );
}
