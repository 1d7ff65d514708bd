/** Looks of what is pressed: `primary` once a page, `plain` for the rest, `quiet` inside cards, `danger` for what destroys. */
export type ButtonKind = 'primary' | 'plain' | 'quiet' | 'danger';
export type ButtonSize = 'md' | 'sm';

const shared =
	'inline-flex items-center justify-center gap-2 rounded-full font-semibold transition-colors select-none ' +
	'disabled:cursor-not-allowed disabled:opacity-55 aria-disabled:cursor-not-allowed aria-disabled:opacity-55';

const kinds: Record<ButtonKind, string> = {
	primary: 'bg-sun text-on-sun hover:brightness-105 active:brightness-95',
	plain: 'border border-edge/60 bg-sheet text-ink shadow-low hover:border-ink',
	quiet: 'text-ink hover:bg-frost/60',
	danger: 'border border-stop text-stop bg-sheet hover:bg-stop hover:text-on-stop'
};

const sizes: Record<ButtonSize, string> = {
	md: 'min-h-10 px-5 py-2 text-[0.9375rem]',
	sm: 'min-h-8 px-3.5 py-1 text-sm'
};

export function buttonClass(kind: ButtonKind, size: ButtonSize): string {
	return `${shared} ${kinds[kind]} ${sizes[size]}`;
}
