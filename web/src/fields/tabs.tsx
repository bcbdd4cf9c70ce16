import type { ComponentChildren } from 'preact';
import { useEffect, useRef } from 'preact/hooks';

interface TabsProps<Key extends string> {
  readonly label: string;
  /** Tells the tabs of one list from those of another. */
  readonly prefix: string;
  readonly shown: Key;
  readonly tabs: readonly { readonly key: Key; readonly name: string }[];
  readonly show: (key: Key) => void;
  readonly children: ComponentChildren;
}

/** Where the keys lead from the tab at `index`. */
const moves: Readonly<Record<string, (index: number, count: number) => number>> = {
  ArrowLeft: (index, count) => (index + count - 1) % count,
  ArrowRight: (index, count) => (index + 1) % count,
  Home: () => 0,
  End: (_, count) => count - 1,
};

/** Brings the chosen tab into sight where the list is wider than its place, without moving the page. */
function useTabInSight(id: string) {
  const list = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const tab = document.getElementById(id);
    if (!list.current || !tab) return;
    const { scrollLeft, clientWidth } = list.current;
    const left = tab.offsetLeft - list.current.offsetLeft;
    if (left < scrollLeft) list.current.scrollLeft = left;
    else if (left + tab.offsetWidth > scrollLeft + clientWidth)
      list.current.scrollLeft = left + tab.offsetWidth - clientWidth;
  }, [id]);
  return list;
}

/** Several views in one place, one of them in sight; arrow keys, Home and End go from tab to tab. */
export function Tabs<Key extends string>({ label, prefix, shown, tabs, show, children }: TabsProps<Key>) {
  const idOf = (key: Key): string => `${prefix}-tab-${key}`;
  const list = useTabInSight(idOf(shown));
  const choose = (event: KeyboardEvent, index: number): void => {
    const move = moves[event.key];
    const next = move && tabs[move(index, tabs.length)];
    if (!next || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    show(next.key);
    document.getElementById(idOf(next.key))?.focus();
  };
  return (
    <>
      <div ref={list} role="tablist" aria-label={label}>
        {tabs.map(({ key, name }, index) => (
          <button
            key={key}
            type="button"
            role="tab"
            id={idOf(key)}
            aria-selected={key === shown}
            aria-controls={`${prefix}-panel`}
            tabIndex={key === shown ? 0 : -1}
            data-label={name}
            onClick={() => show(key)}
            onKeyDown={(event) => choose(event, index)}
          >
            {name}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${prefix}-panel`} aria-labelledby={idOf(shown)} tabIndex={0}>
        {children}
      </div>
    </>
  );
}
