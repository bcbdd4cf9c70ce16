import { useEffect, useRef, useState } from 'preact/hooks';

type State = 'ready' | 'copied' | 'refused';

/** Shown where the browser keeps the clipboard from a page: the text, selected, for the person to copy. */
function ByHand({ text }: { readonly text: string }) {
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => field.current?.select(), [text]);
  return <input ref={field} class="copy-by-hand" readOnly value={text} aria-label="The price as text, to copy" />;
}

/** Puts the price as a sentence on the clipboard and says so on the button, whose width stays. */
export function CopyPrice({ text }: { readonly text: string }) {
  const [state, setState] = useState<State>('ready');
  useEffect(() => setState('ready'), [text]);
  useEffect(() => {
    if (state !== 'copied') return;
    const timer = setTimeout(() => setState('ready'), 2500);
    return () => clearTimeout(timer);
  }, [state]);

  const copy = async (): Promise<void> => {
    try {
      await navigator.clipboard.writeText(text);
      setState('copied');
    } catch {
      setState('refused');
    }
  };

  return (
    <>
      {state === 'refused' && <ByHand text={text} />}
      <button type="button" class="quiet copy-price" onClick={() => void copy()}>
        {state === 'copied' ? 'Copied' : 'Copy price'}
      </button>
      <span class="sr-only" role="status">
        {state === 'copied' ? 'Copied' : ''}
      </span>
    </>
  );
}
