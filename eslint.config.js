import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

export default ts.config(
	{ ignores: ['node_modules/', '.svelte-kit/', 'build/', '.data/', 'test-results/', 'drizzle/'] },
	{ linterOptions: { reportUnusedDisableDirectives: 'error' } },
	js.configs.recommended,
	...ts.configs.recommended,
	...svelte.configs['flat/recommended'],
	prettier,
	...svelte.configs['flat/prettier'],
	{
		languageOptions: { globals: { ...globals.browser, ...globals.node } },
		rules: {
			// TypeScript knows what is defined.
			'no-undef': 'off',
			eqeqeq: ['error', 'always'],
			'no-empty': ['error', { allowEmptyCatch: false }],
			'no-console': ['error', { allow: ['error', 'warn'] }],
			'@typescript-eslint/no-explicit-any': 'error',
			'@typescript-eslint/ban-ts-comment': 'error',
			'@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
			'@typescript-eslint/no-unused-vars': [
				'error',
				{ argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true }
			],
			// Links are plain paths: the application is always served at the root of its host.
			'svelte/no-navigation-without-resolve': 'off',
			// Sets, maps and dates here are replaced as a whole or live inside one function.
			'svelte/prefer-svelte-reactivity': 'off',
			// A blank between two inline pieces has to be written out.
			'svelte/no-useless-mustaches': 'off'
		}
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts'],
		languageOptions: {
			parserOptions: { parser: ts.parser, extraFileExtensions: ['.svelte'], svelteConfig }
		}
	},
	{
		// Commands and the bench speak on the terminal.
		files: ['scripts/**', 'tests/**'],
		rules: { 'no-console': 'off' }
	}
);
