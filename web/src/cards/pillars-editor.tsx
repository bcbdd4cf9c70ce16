import { Choice } from '../fields/choice';
import { interpolations, RateConvention } from '../fields/conventions';
import { Rows } from '../fields/rows';
import { typed } from '../store/session';

const quotes = [
  { value: 'zero', name: 'zero rates' },
  { value: 'factor', name: 'discount factors' },
];

/** Points of a curve: dates or tenors with a zero rate or a discount factor each. */
export function PillarsEditor({ path, at }: { readonly path: string; readonly at: string }) {
  const zero = typed(`${path}/quote`) === 'zero';
  return (
    <>
      <Rows
        name="Points of the curve"
        rowName="Point"
        path={`${path}/rows`}
        at={`${at}/pillars`}
        columns={[
          {
            name: 'at',
            label: 'Date or tenor',
            holds: 'date-or-tenor',
            called: ['at', 'date', 'tenor', 'term', 'maturity', 'pillar', 'point'],
            size: 9,
          },
          {
            name: 'value',
            label: zero ? 'Zero rate' : 'Factor',
            ...(zero ? { unit: '%' } : {}),
            holds: zero ? 'percent' : 'plain',
            called: ['value', 'rate', 'zero', 'zero rate', 'factor', 'discount factor', 'df', 'yield'],
            size: 8,
          },
        ]}
      />
      <Choice label="The points are" path={`${path}/quote`} at={`${at}/quote`} options={quotes} />
      {zero && <RateConvention path={path} at={at} />}
      <Choice
        label="Between the points"
        path={`${path}/interpolation`}
        at={`${at}/interpolation`}
        options={interpolations}
      />
    </>
  );
}
