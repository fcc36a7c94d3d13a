// Run from the top: eslint --config test/eslint.config.js --max-warnings 0 .
// No rule here needs type information; what does (comparing objects with < or ===) is in tidy.test.ts.
import svelte from 'eslint-plugin-svelte';
import { parser, configs, plugin } from 'typescript-eslint';

const LINE = { tabWidth: 2, ignoreUrls: true, ignoreTemplateLiterals: true, ignoreRegExpLiterals: true };

/** @type {import('eslint').Linter.Config} */
const everywhere = {
	rules: {
		// TypeScript knows every name, also those of the browser
		'no-undef': 'off',
		'no-console': 'error',
		eqeqeq: 'error',
		'no-var': 'error',
		'prefer-const': 'error',
		'no-eval': 'error',
		'no-implied-eval': 'error',
		'no-new-func': 'error',
		'no-alert': 'error',
		'no-debugger': 'error',
		'no-empty': ['error', { allowEmptyCatch: false }],
		'no-warning-comments': ['error', { terms: ['to' + 'do', 'fix' + 'me', 'x' + 'xx', 'place' + 'holder'], location: 'anywhere' }],
		'max-len': ['error', { ...LINE, code: 160 }],
		'@typescript-eslint/no-explicit-any': 'error',
		'@typescript-eslint/ban-ts-comment': ['error', { 'ts-ignore': true, 'ts-nocheck': true, 'ts-expect-error': true }],
		// the compiler's own noUnusedLocals does this, and knows more
		'@typescript-eslint/no-unused-vars': ['error', { args: 'none', varsIgnorePattern: '^_', destructuredArrayIgnorePattern: '^_' }],
		// records and keyed lists are looked up with noUncheckedIndexedAccess on; a stated ! is how a known index is read
		'@typescript-eslint/no-non-null-assertion': 'off'
	}
};

/** @type {import('eslint').Linter.Config[]} */
export default [
	{ ignores: ['build/**', 'build-*/**', '.svelte-kit/**', 'node_modules/**', 'coverage/**', 'test/records/**/*.json'] },
	{ linterOptions: { reportUnusedDisableDirectives: 'error', noInlineConfig: true } },
	...configs.recommended,
	...svelte.configs.recommended,
	everywhere,
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		languageOptions: { parserOptions: { parser, extraFileExtensions: ['.svelte'] } },
		rules: {
			// long lists are plain on purpose, beside one counter of revisions: a deep $state of a lot costs a keystroke dearly
			'svelte/prefer-svelte-reactivity': 'off',
			'svelte/no-at-html-tags': 'error',
			'svelte/require-each-key': 'error',
			'svelte/button-has-type': 'error',
			// links inside the app go through resolve() of $app/paths
			'svelte/no-navigation-without-resolve': 'error',
			// props are taken apart in one let as soon as one of them is bindable
			'prefer-const': 'off',
			'svelte/prefer-const': ['error', { destructuring: 'all', excludedRunes: ['$props', '$derived'] }]
		}
	},
	{
		files: ['src/ui/**/*.svelte'],
		rules: {
			// the links of a component are handed to it, resolved by the page
			'svelte/no-navigation-without-resolve': 'off'
		}
	},
	{
		files: ['src/trade/**/*.ts'],
		rules: {
			'no-restricted-globals': [
				'error',
				...['performance', 'crypto', 'setTimeout', 'setInterval', 'fetch'].map((name) => ({
					name,
					message: 'src/trade has no clock, no random and no outside: pass the value in.'
				}))
			],
			'no-restricted-syntax': [
				'error',
				{
					selector: 'NewExpression[callee.name="Date"][arguments.length=0], CallExpression[callee.name="Date"]',
					message: 'src/trade has no clock: pass the time in.'
				}
			],
			'no-restricted-properties': [
				'error',
				{ object: 'Math', property: 'random', message: 'src/trade has no random: pass the function in.' },
				{ object: 'Date', property: 'now', message: 'src/trade has no clock: pass the time in.' }
			]
		}
	},
	{
		files: ['test/**'],
		plugins: { '@typescript-eslint': plugin },
		rules: {
			'no-console': 'off',
			// tables of published values read best in one line each
			'max-len': ['error', { ...LINE, code: 180 }],
			'@typescript-eslint/ban-ts-comment': ['error', { 'ts-ignore': true, 'ts-nocheck': true, 'ts-expect-error': 'allow-with-description' }],
			'no-restricted-syntax': [
				'error',
				{
					selector: 'MemberExpression[property.name=/^(only|skip|fails|todo|skipIf|runIf)$/][object.name=/^(test|it|describe|suite|bench)$/]',
					message: 'Every test runs, every time.'
				}
			]
		}
	}
];
