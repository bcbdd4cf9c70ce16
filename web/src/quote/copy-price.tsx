import { useEffect, useState } from 'preact/hooks';

/** The old way, for browsers that refuse the clipboard to a page from a disk. */
function copyBySelection(text: string): boolean {
  const area = document.createElement('textarea');
  area.value = text;
  area.className = 'sr-only';
  document.body.append(area);
  area.select();
  const done = document.execCommand('copy');
  area.remove();
  return done;
}

async function copyText(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    return copyBySelection(text);
  }
}

/** Puts the price as a sentence on the clipboard and says so on the button, whose width stays. */
export function CopyPrice({ text }: { readonly text: string }) {
  const [said, setSaid] = useState('');
  useEffect(() => setSaid(''), [text]);
  useEffect(() => {
    if (!said) return;
    const timer = setTimeout(() => setSaid(''), 2500);
    return () => clearTimeout(timer);
  }, [said]);
  return (
    <>
      <button
        type="button"
        class="quiet copy-price"
        onClick={() => void copyText(text).then((done) => setSaid(done ? 'Copied' : 'Not copied'))}
      >
        {said || 'Copy price'}
      </button>
      <span class="sr-only" role="status">
        {said}
      </span>
    </>
  );
}
