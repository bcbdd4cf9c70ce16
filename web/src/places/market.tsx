import { useRef } from 'preact/hooks';
import { Cards } from '../cards/cards';
import { openFile, save } from '../files/open-save';
import { SheetFields } from '../cards/sheet-fields';
import { deal, draft } from '../store/session';
import { addMarket, chooseMarket, removeMarket } from '../store/markets';
import { chooseDecimal } from '../store/decimal-choice';
import { format } from '../model/view';
import { Cautions } from '../shell/cautions';
import { CalendarView } from './calendar-view';
import { CurveView } from './curve-view';

function Markets() {
  const { deals, current } = draft.value;
  return (
    <nav class="markets" aria-label="Markets at hand">
      {Object.entries(deals).map(([id, { market }]) => (
        <button
          key={id}
          type="button"
          class="plain"
          aria-current={id === current ? 'true' : undefined}
          onClick={() => chooseMarket(id)}
        >
          {market.asset.name.trim() || id}
        </button>
      ))}
      <button type="button" class="quiet" onClick={addMarket}>
        Another asset
      </button>
    </nav>
  );
}

function Numbers() {
  return (
    <div class="segmented" role="radiogroup" aria-label="Decimal sign">
      {(['.', ','] as const).map((sign) => (
        <label key={sign}>
          <input
            type="radio"
            name="decimal-sign"
            checked={format.value.decimal === sign}
            onChange={() => chooseDecimal(sign)}
          />
          <span>{sign === '.' ? '1234.5' : '1234,5'}</span>
        </label>
      ))}
    </div>
  );
}

/** The whole sheet of one market at once: rates, income, calendar. */
export function MarketPlace() {
  const file = useRef<HTMLInputElement>(null);
  return (
    <main class="place place-market" id="here">
      <div class="block">
        <h1>{deal.value.market.asset.name.trim() || draft.value.current}</h1>
        <Markets />
        <div class="row">
          <button type="button" class="plain" onClick={save}>
            Save to a file
          </button>
          <button type="button" class="plain" onClick={() => file.current?.click()}>
            Open a file
          </button>
          <input
            ref={file}
            type="file"
            accept=".json,application/json"
            hidden
            aria-label="File to open"
            onChange={(event) => {
              const [chosen] = event.currentTarget.files ?? [];
              if (chosen !== undefined) void openFile(chosen);
              event.currentTarget.value = '';
            }}
          />
          <button
            type="button"
            class="quiet"
            aria-disabled={Object.keys(draft.value.deals).length < 2}
            onClick={removeMarket}
          >
            Take this market out
          </button>
          <span class="row">
            <span class="label">Numbers are written</span> <Numbers />
          </span>
        </div>
        <SheetFields />
      </div>
      <div class="sheet-cards">
        <h2 class="sr-only">What the prices rest on</h2>
        <Cards alwaysOpen />
      </div>
      <CurveView />
      <CalendarView />
      <Cautions />
    </main>
  );
}
