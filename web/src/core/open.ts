/**
 * Opens the core wherever this browser lets it run: WebAssembly in a Worker started from the page itself; on the
 * page's own thread where a Worker is refused; as plain script where WebAssembly is switched off.
 */
import { moduleScript, moduleWasm } from 'virtual:packed-core';
import { plainScript } from './plain/script';
import { unpack } from './unpack';

/** The core as the page uses it: a request in, its answer out. */
export interface Core {
  readonly kind: 'module' | 'plain';
  readonly thread: 'worker' | 'page';
  readonly version: string;
  answer(request: string): Promise<string>;
  /** Ends its Worker, where it has one; what it was asked is not answered any more. */
  close(): void;
}

/** What the core's own script defines. */
interface OpenedCore {
  answer(request: string): string;
  version(): string;
}
type Open = (given: object) => Promise<OpenedCore>;

interface Parts {
  readonly kind: Core['kind'];
  readonly script: Uint8Array<ArrayBuffer>;
  readonly given: { readonly wasmBinary: Uint8Array<ArrayBuffer> };
}

/** The smallest WebAssembly with one vector instruction: the module wants both. */
const vectorProbe = new Uint8Array([
  0, 97, 115, 109, 1, 0, 0, 0, 1, 5, 1, 96, 0, 1, 123, 3, 2, 1, 0, 10, 10, 1, 8, 0, 65, 0, 253, 15, 253, 98, 11,
]);

/** How long a Worker may take to open before it counts as refused; plain script on a slow machine takes a second. */
const mostOpeningMilliseconds = 15_000;

const closedWords = 'The core was closed.';

function hasWebAssembly(): boolean {
  return typeof WebAssembly === 'object' && WebAssembly.validate(vectorProbe);
}

/** Made once, however many cores are opened. */
function once<T>(make: () => Promise<T>): () => Promise<T> {
  let made: Promise<T> | undefined;
  return () => (made ??= make());
}

const modulePart = once(async (): Promise<Parts> => {
  const [script, wasmBinary] = await Promise.all([unpack(moduleScript), unpack(moduleWasm)]);
  return { kind: 'module', script, given: { wasmBinary } };
});

const plainPart = once(async (): Promise<Parts> => {
  const { script, given } = await modulePart();
  const text = plainScript(given.wasmBinary, new TextDecoder().decode(script));
  return { kind: 'plain', script: new TextEncoder().encode(text), given };
});

/** Runs in the Worker, after the core's own script, of which it knows only `forwrightCore`. */
function serve(): void {
  const scope = self as unknown as {
    forwrightCore: Open;
    onmessage: ((event: MessageEvent) => void) | null;
    postMessage(message: unknown): void;
  };
  scope.onmessage = (opening) => {
    scope.forwrightCore(opening.data as object).then(
      (core) => {
        scope.onmessage = (event) => {
          const { id, request } = event.data as { id: number; request: string };
          scope.postMessage({ id, answer: core.answer(request) });
        };
        scope.postMessage({ version: core.version() });
      },
      (reason: unknown) => scope.postMessage({ refused: String(reason) }),
    );
  };
}

async function openInWorker({ kind, script, given }: Parts): Promise<Core> {
  const source = URL.createObjectURL(new Blob([script, `;(${serve.toString()})();`], { type: 'text/javascript' }));
  const worker = new Worker(source);
  const version = await new Promise<string>((opened, failed) => {
    const late = setTimeout(() => failed(new Error('The Worker does not answer.')), mostOpeningMilliseconds);
    worker.onmessage = (event) => {
      clearTimeout(late);
      const { version: said, refused } = event.data as { version?: string; refused?: string };
      if (said === undefined) failed(new Error(refused));
      else opened(said);
    };
    worker.onerror = (event) => {
      event.preventDefault();
      clearTimeout(late);
      failed(new Error(event.message));
    };
    worker.postMessage(given);
  }).catch((reason: unknown) => {
    worker.terminate();
    throw reason;
  });
  URL.revokeObjectURL(source);

  const waiting = new Map<number, { done: (answer: string) => void; failed: (reason: Error) => void }>();
  worker.onmessage = (event) => {
    const { id, answer } = event.data as { id: number; answer: string };
    waiting.get(id)?.done(answer);
    waiting.delete(id);
  };
  worker.onerror = (event) => {
    for (const { failed } of waiting.values()) failed(new Error(event.message));
    waiting.clear();
  };
  let lastId = 0;
  let closed = false;
  return {
    kind,
    thread: 'worker',
    version,
    answer: (request) =>
      new Promise((done, failed) => {
        if (closed) {
          failed(new Error(closedWords));
          return;
        }
        const id = ++lastId;
        waiting.set(id, { done, failed });
        worker.postMessage({ id, request });
      }),
    close: () => {
      closed = true;
      worker.terminate();
      for (const { failed } of waiting.values()) failed(new Error(closedWords));
      waiting.clear();
    },
  };
}

async function openOnPage({ kind, script, given }: Parts): Promise<Core> {
  const source = URL.createObjectURL(new Blob([script], { type: 'text/javascript' }));
  const element = document.createElement('script');
  await new Promise<void>((loaded, failed) => {
    element.onload = () => loaded();
    element.onerror = () => failed(new Error('The script is refused.'));
    element.src = source;
    document.head.append(element);
  });
  element.remove();
  URL.revokeObjectURL(source);
  const core = await (globalThis as unknown as { forwrightCore: Open }).forwrightCore(given);
  return {
    kind,
    thread: 'page',
    version: core.version(),
    answer: (request) => Promise.resolve().then(() => core.answer(request)),
    close: () => undefined,
  };
}

async function openSomewhere(parts: Parts): Promise<Core> {
  try {
    return await openInWorker(parts);
  } catch {
    return openOnPage(parts);
  }
}

/** Opens the core, or fails where this browser runs none of its forms. */
export async function openCore(): Promise<Core> {
  if (hasWebAssembly()) {
    try {
      return await openSomewhere(await modulePart());
    } catch {
      // Compiled, yet not allowed to run: the plain script needs no more than script itself.
    }
  }
  return openSomewhere(await plainPart());
}
