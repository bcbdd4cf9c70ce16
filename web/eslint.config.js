import js from '@eslint/js';
import typescript from 'typescript-eslint';

/** Whatever can reach a network: the page never does, and this keeps it from having the means. */
const networkNames = [
  'fetch',
  'XMLHttpRequest',
  'WebSocket',
  'WebSocketStream',
  'WebTransport',
  'EventSource',
  'RTCPeerConnection',
  'webkitRTCPeerConnection',
  'Request',
  'SharedWorker',
  'importScripts',
];
const noNetwork = 'Forwright never talks to a network.';

const networkRules = {
  'no-restricted-globals': ['error', ...networkNames.map((name) => ({ name, message: noNetwork }))],
  'no-restricted-properties': [
    'error',
    ...networkNames.flatMap((property) =>
      ['window', 'self', 'globalThis'].map((object) => ({ object, property, message: noNetwork })),
    ),
    ...['sendBeacon', 'serviceWorker', 'connection'].map((property) => ({
      object: 'navigator',
      property,
      message: noNetwork,
    })),
    ...['window', 'self', 'globalThis'].map((object) => ({ object, property: 'open', message: noNetwork })),
    ...['assign', 'replace', 'href'].map((property) => ({ object: 'location', property, message: noNetwork })),
  ],
  'no-restricted-syntax': [
    'error',
    { selector: 'CallExpression[callee.name="open"]', message: noNetwork },
    { selector: 'Literal[value=/^(https?|wss?|ftp):/]', message: `${noNetwork} No outward links.` },
    { selector: 'TemplateElement[value.raw=/^(https?|wss?|ftp):/]', message: `${noNetwork} No outward links.` },
    {
      selector:
        'JSXOpeningElement[name.name=/^(iframe|object|embed|form)$/] > JSXAttribute[name.name=/^(src|data|action)$/]',
      message: noNetwork,
    },
    { selector: 'JSXAttribute[name.name="dangerouslySetInnerHTML"]', message: 'Views are made of elements.' },
  ],
};

export default typescript.config(
  { ignores: ['node_modules/', 'src/generated/'] },
  js.configs.recommended,
  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [...typescript.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      ...networkRules,
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  {
    files: ['vite.config.ts', 'tools/**/*.mjs', '*.js'],
    extends: [...typescript.configs.recommended],
    languageOptions: { globals: { process: 'readonly', console: 'readonly', Buffer: 'readonly' } },
  },
);
