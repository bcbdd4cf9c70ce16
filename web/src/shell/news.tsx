import { useEffect } from 'preact/hooks';
import { fileNews } from '../files/open-save';
import { notKept } from '../files/keep';
import { bookNews } from '../book/book';

const shownMilliseconds = 6000;

/** What became of a file or of the book, and whether anything is not kept: said once, then gone; what is wrong stays. */
export function News() {
  const news = fileNews.value ?? bookNews.value;
  useEffect(() => {
    if (news === null || news.wrong) return undefined;
    const waiting = setTimeout(() => {
      fileNews.value = null;
      bookNews.value = null;
    }, shownMilliseconds);
    return () => clearTimeout(waiting);
  }, [news]);
  return (
    <div class="news" role="status">
      {news !== null && (
        <p class={news.wrong ? 'notice wrong' : 'notice'}>
          {news.text}{' '}
          <button
            type="button"
            class="quiet"
            onClick={() => {
              fileNews.value = null;
              bookNews.value = null;
            }}
          >
            Close
          </button>
        </p>
      )}
      {notKept.value !== null && <p class="notice wrong">{notKept.value}</p>}
    </div>
  );
}
