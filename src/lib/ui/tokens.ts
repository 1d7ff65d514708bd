/**
 * The colour tokens of `app.css` as data, for what CSS variables cannot reach: the 3D scene, canvases, the contrast
 * test. A test holds both lists equal. `onX` is the text colour for a surface filled with X; `xWash` is a faint
 * ground for a notice of that meaning; `edge` draws the border of a control (3:1), `frost` a mere division.
 */
export const lightTokens = {
	paper: '#f7f4ec',
	sheet: '#fffdf7',
	ink: '#1d2a30',
	inkSoft: '#55646a',
	frost: '#d5e1e5',
	edge: '#7e8e95',
	sun: '#d98a12',
	onSun: '#1d2a30',
	sunInk: '#8a5405',
	sunWash: '#fbeedb',
	shade: '#4d4a86',
	shadeWash: '#eceaf3',
	blind: '#b3315f',
	blindWash: '#fbe8ee',
	clear: '#2b714c',
	clearWash: '#e3f0e7',
	stop: '#b5371f',
	onStop: '#ffffff',
	stopWash: '#fbe7e2',
	field: '#eae5d5',
	hill: '#f3e2bd'
} as const;

export type TokenName = keyof typeof lightTokens;
export type Tokens = Record<TokenName, string>;

export const darkTokens: Tokens = {
	paper: '#12181c',
	sheet: '#1a2227',
	ink: '#ece7da',
	inkSoft: '#9fb0b5',
	frost: '#26343b',
	edge: '#66787f',
	sun: '#f0a93a',
	onSun: '#12181c',
	sunInk: '#f0a93a',
	sunWash: '#33291a',
	shade: '#8e8bd0',
	shadeWash: '#262842',
	blind: '#ee6f9b',
	blindWash: '#3a2029',
	clear: '#62b98a',
	clearWash: '#1b3128',
	stop: '#f2795f',
	onStop: '#12181c',
	stopWash: '#3b211c',
	field: '#1e272a',
	hill: '#3a2f1f'
};

/** Tokens of the theme that is shown. */
export function tokensOf(theme: 'light' | 'dark'): Tokens {
	return theme === 'dark' ? darkTokens : lightTokens;
}
