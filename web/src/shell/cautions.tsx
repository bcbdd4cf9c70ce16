import { formatDate } from '../format';
import { sheetTime } from '../store/sheet-time';

/** What always stands under a quote. */
export function Cautions() {
  const { asOf, time, stale, why } = sheetTime.value;
  const when = [asOf === '' ? 'no date' : formatDate(asOf), time].filter((word) => word !== '').join(', ');
  return (
    <p class="cautions">
      Indicative and not an offer, until the desk confirms it. It rests on the market of {when}
      {stale && <strong>, which is stale ({why})</strong>}. Dealing, suitability and disclosure follow local rules and
      licensed staff; nothing here is advice.
    </p>
  );
}
