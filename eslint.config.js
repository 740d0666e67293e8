import eslint from '@eslint/js';
import vue from 'eslint-plugin-vue';
import accessibility from 'eslint-plugin-vuejs-accessibility';
import globals from 'globals';
import tseslint from 'typescript-eslint';
import { roomsRule } from './eslint/rooms.js';

const without = (names, ...others) => Object.keys(names).filter((name) => !others.some((other) => name in other));
const domOnly = [
  ...without(globals.browser, globals.node, globals.builtin),
  'localStorage',
  'sessionStorage',
  'navigator',
  'Storage',
];
const nodeOnly = without(globals.node, globals.browser, globals.builtin);
const network = ['fetch', 'XMLHttpRequest', 'WebSocket', 'EventSource'];

/** Globals that a room may not touch, each refused with its reason. */
const refuse = (...groups) => ({
  'no-restricted-globals': ['error', ...groups.flatMap(([names, message]) => names.map((name) => ({ name, message })))],
});
const noDom = [domOnly, 'The DOM belongs in app, main/browser, the preload and the browser worker host.'];
const noNode = [nodeOnly, 'Node belongs in solver/service/hosts and main.'];
const noNetwork = [network, 'The program uses no network.'];

/** Layout is the formatter's business. */
const vueLayoutOff = Object.fromEntries(
  Object.entries(vue.rules)
    .filter(([, rule]) => rule.meta.type === 'layout')
    .map(([name]) => [`vue/${name}`, 'off']),
);

export default tseslint.config(
  { ignores: ['out/', 'coverage/', '**/node_modules/'] },
  eslint.configs.recommended,
  tseslint.configs.recommended,
  vue.configs['flat/recommended'],
  accessibility.configs['flat/recommended'],
  {
    languageOptions: { globals: globals['shared-node-browser'], parserOptions: { parser: tseslint.parser } },
    plugins: { house: { rules: { rooms: roomsRule } } },
    rules: {
      ...vueLayoutOff,
      'house/rooms': 'error',
      eqeqeq: 'error',
      'no-undef': 'off', // the type checker's business
      'no-warning-comments': 'error',
      '@typescript-eslint/consistent-type-imports': [
        'error',
        { fixStyle: 'inline-type-imports', disallowTypeAnnotations: false },
      ],
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      'vue/multi-word-component-names': 'off',
      'vue/block-lang': ['error', { script: { lang: 'ts' } }],
      'vuejs-accessibility/label-has-for': ['error', { required: { some: ['nesting', 'id'] } }],
    },
  },
  { files: ['solver/**'], rules: refuse(noDom, noNode, noNetwork) },
  { files: ['solver/service/hosts/**'], rules: refuse(noDom, noNetwork) },
  { files: ['solver/service/hosts/worker*.ts', 'main/desktop/preload.ts'], rules: refuse(noNode, noNetwork) },
  { files: ['app/**'], rules: refuse(noNode, noNetwork) },
  { files: ['app/draw/**', 'app/commands/**'], rules: refuse(noDom, noNode, noNetwork) },
  { files: ['main/**'], ignores: ['main/browser/**', 'main/desktop/preload.ts'], rules: refuse(noDom, noNetwork) },
  { files: ['solver/**', 'app/**'], rules: { 'no-console': 'error' } },
  {
    files: ['tests/**'],
    rules: {
      'no-restricted-syntax': [
        'error',
        {
          selector: 'MemberExpression[object.name=/^(it|test|describe)$/][property.name=/^(skip|only|todo|skipIf|runIf|fails)$/]',
          message: 'A test runs, always.',
        },
      ],
      'vue/one-component-per-file': 'off',
    },
  },
);
