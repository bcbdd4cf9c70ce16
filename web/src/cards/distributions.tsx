import { Choice } from '../fields/choice';
import { Field } from '../fields/field';
import { isBlank, sentIndexes, type CashRow } from '../model/draft';
import { market } from '../store/session';

const statuses = [
  { value: '', name: 'not said' },
  { value: 'declared', name: 'declared' },
  { value: 'estimated', name: 'estimated' },
];
const types = [
  { value: '', name: 'not said' },
  { value: 'ordinary', name: 'ordinary' },
  { value: 'special', name: 'special' },
];
const treatments = [
  { value: '', name: 'taken off the price' },
  { value: 'passed-through', name: 'passed on to the client when paid' },
  { value: 'adjusts-contract', name: 'adjusts the contract on the ex date' },
];

/** What is out of the usual about a row, for its closed line. */
function words(row: CashRow): string {
  const said = [
    row.status,
    row.type === 'special' ? 'special' : '',
    treatments.find(({ value }) => value !== '' && value === row.treatment)?.name ?? '',
    row.currency.trim() === '' ? '' : `in ${row.currency.trim().toUpperCase()}`,
    row.passBid.trim() === '' && row.passOffer.trim() === '' ? '' : 'its own pass-through',
  ].filter((word) => word !== '');
  return said.length === 0 ? 'in the price' : said.join(', ');
}

/** What becomes of each distribution under the forward: one line a row, open to change it. */
export function Distributions() {
  const { cash } = market.value.income;
  const indexes = sentIndexes(cash);
  return (
    <>
      {cash.map((row, index) => {
        if (isBlank(row)) return null;
        const path = `market/income/cash/${index}`;
        const at = `/market/income/cash/${indexes[index] ?? 'new'}`;
        return (
          <details class="distribution" key={row.id}>
            <summary>
              {row.ex.trim() === '' ? `Distribution ${index + 1}` : row.ex.trim()}: {words(row)}
            </summary>
            <Choice label="It is" path={`${path}/treatment`} at={`${at}/treatment`} options={treatments} />
            <div class="field-row">
              <Choice label="Status" path={`${path}/status`} at={`${at}/status`} options={statuses} />
              <Choice label="Kind" path={`${path}/type`} at={`${at}/type`} options={types} />
            </div>
            <div class="field-row">
              <Field
                label="In another currency"
                path={`${path}/currency`}
                at={`${at}/currency`}
                kind="text"
                placeholder="USD"
              />
              <Field label="Its forward rate" path={`${path}/forwardRate`} at={`${at}/forwardRate`} kind="price" />
            </div>
            <div class="field-row">
              <Field
                label="Owed when short"
                path={`${path}/passBid`}
                at={`${at}/passThrough/bid`}
                kind="percent"
                unit="%"
              />
              <Field
                label="Kept when long"
                path={`${path}/passOffer`}
                at={`${at}/passThrough/offer`}
                kind="percent"
                unit="%"
              />
            </div>
          </details>
        );
      })}
    </>
  );
}
