import { place } from '../model/view';
import { AgreedPlace } from '../places/agreed';
import { BookPlace } from '../places/book';
import { MarketPlace } from '../places/market';
import { QuotePlace } from '../places/quote';
import { RequestsPlace } from '../places/requests';
import { PrintSheet } from '../print/print-sheet';
import { Announcer } from './announcer';
import { Header } from './header';
import { Help, helpOpen } from './help';
import { News } from './news';

function Here() {
  switch (place.value) {
    case 'quote':
      return <QuotePlace />;
    case 'requests':
      return <RequestsPlace />;
    case 'agreed':
      return <AgreedPlace />;
    case 'book':
      return <BookPlace />;
    case 'market':
      return <MarketPlace />;
  }
}

export function App() {
  return (
    <>
      <div class="app">
        <a class="skip" href="#here">
          To the sheet
        </a>
        <Header />
        <News />
        <Here />
        <footer class="foot">
          <button type="button" class="quiet" onClick={() => (helpOpen.value = true)}>
            Keys <kbd aria-hidden="true">?</kbd>
          </button>
        </footer>
        <Announcer />
        <Help />
      </div>
      <PrintSheet />
    </>
  );
}
