/** One line of a menu: an action, a link, or a divider between groups. */
export type MenuItem =
	| {
			kind?: 'action';
			label: string;
			hint?: string;
			pressed?: boolean;
			disabled?: boolean;
			danger?: boolean;
			onselect: () => void;
	  }
	| { kind: 'link'; label: string; hint?: string; href: string; pressed?: boolean; download?: boolean }
	| { kind: 'divider'; label?: string };
