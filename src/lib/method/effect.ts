/** What an effect is: words for the page "Method and checks", without any number that is measured. */

/** Left out of the computation, and how much it matters. */
export interface Neglected {
	what: string;
	howBig: string;
}

export interface Effect<Id extends string = string> {
	/** Lower case with hyphens: the anchor of its section. */
	id: Id;
	title: string;
	/** Two or three plain sentences: what is computed. */
	words: string;
	/** Where the formula comes from: authors, years, equations. */
	sources: readonly string[];
	neglected: readonly Neglected[];
}
