import { createContext } from 'svelte';

export type ThemeChoice = 'light' | 'dark' | 'system';

const YEAR_S = 31_536_000;

/**
 * The theme that the person chose and the one that is shown. The choice lives in the cookie `theme`, which the script in
 * `app.html` reads before the first paint; `system` follows the device while the page is open too.
 */
export class Theme {
	choice = $state<ThemeChoice>('system');
	#dark = $state(false);

	get shown(): 'light' | 'dark' {
		return this.#dark ? 'dark' : 'light';
	}

	/** Call in the browser once; answers what stops listening. */
	start(): () => void {
		const saved = /(?:^|; )theme=(light|dark)/.exec(document.cookie)?.[1];
		this.choice = saved === 'light' || saved === 'dark' ? saved : 'system';
		const device = matchMedia('(prefers-color-scheme: dark)');
		const follow = () => this.#apply(device.matches);
		follow();
		// Paper is white: a dark page prints in the light colours.
		const onPaper = () => (document.documentElement.dataset.theme = 'light');
		device.addEventListener('change', follow);
		window.addEventListener('beforeprint', onPaper);
		window.addEventListener('afterprint', follow);
		return () => {
			device.removeEventListener('change', follow);
			window.removeEventListener('beforeprint', onPaper);
			window.removeEventListener('afterprint', follow);
		};
	}

	choose(choice: ThemeChoice): void {
		this.choice = choice;
		const age = choice === 'system' ? 0 : YEAR_S;
		document.cookie = `theme=${choice}; path=/; max-age=${age}; samesite=lax`;
		this.#apply(matchMedia('(prefers-color-scheme: dark)').matches);
	}

	#apply(deviceDark: boolean): void {
		this.#dark = this.choice === 'system' ? deviceDark : this.choice === 'dark';
		document.documentElement.dataset.theme = this.shown;
	}
}

const [get, set] = createContext<Theme>();
export const getTheme = get;
export const setTheme = set;
