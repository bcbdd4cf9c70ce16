import { createHash } from 'node:crypto';

/**
 * Puts the page's one script and its style sheets into its HTML, and writes the content policy that allows this
 * script, by its hash, and nothing that comes from elsewhere.
 *
 * The HTML holds `<!-- content policy -->` at the head's beginning, where the policy goes.
 *
 * @param {string} fileName of the file to write, beside which nothing else is left
 * @returns {import("vite").Plugin}
 */
export function singleFile(fileName) {
  return {
    name: 'single-file',
    enforce: 'post',
    generateBundle(_, bundle) {
      const parts = Object.values(bundle);
      const page = the(
        parts.filter((part) => part.fileName.endsWith('.html')),
        'HTML file',
      );
      const script = escaped(
        the(
          parts.filter((part) => part.type === 'chunk'),
          'script',
        ).code.trim(),
      );
      const style = parts
        .filter((part) => part.fileName.endsWith('.css'))
        .map((part) => String(part.source).trim())
        .join('\n');
      const html = String(page.source)
        .replace(/\s*<script type="module"[^>]*><\/script>/, '')
        .replace(/\s*<link rel="(stylesheet|modulepreload)"[^>]*>/g, '');
      if (/<(script|link)\b/.test(html)) {
        this.error("The HTML has a script or a link that is not the page's own.");
      }
      for (const name of Object.keys(bundle)) delete bundle[name];
      this.emitFile({
        type: 'asset',
        fileName,
        source: replaceOnce(
          replaceOnce(
            replaceOnce(html, '<!-- content policy -->', policyFor(script)),
            '</head>',
            `<style>${style}</style></head>`,
          ),
          '</body>',
          `<script type="module">${script}</script></body>`,
        ),
      });
    },
  };
}

/** Nothing is loaded, sent or framed. Style attributes are allowed because Preact sets them. */
function policyFor(script) {
  const hash = createHash('sha256').update(script).digest('base64');
  const policy = [
    "default-src 'none'",
    `script-src 'sha256-${hash}' 'wasm-unsafe-eval' blob:`,
    'worker-src blob:',
    "style-src 'unsafe-inline'",
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  return `<meta http-equiv="Content-Security-Policy" content="${policy}">`;
}

/** What would end the script, or change how HTML reads it, stands in the script's strings only. */
function escaped(script) {
  return script.replace(/<(?=\/script)/gi, '\\x3c').replace(/<(?=!--)/g, '\\x3c');
}

function the(found, what) {
  if (found.length !== 1) throw new Error(`The page must have one ${what}; it has ${found.length}.`);
  return found[0];
}

/** Not `String.replace` with text, which would read `$&` in the script as an order. */
function replaceOnce(text, place, by) {
  const at = text.indexOf(place);
  if (at < 0) throw new Error(`The HTML lacks ${place}.`);
  return text.slice(0, at) + by + text.slice(at + place.length);
}
