const NO_BREAK = '\u00a0';

/** Plain words as a page prints them: units stay with their numbers, a true times sign and a true minus. */
export function typeset(text: string): string {
	return text
		.replace(
			/(\d) (%|°|[kcm]?m²?\b|nm\b|W\/m²|k?Wh\b|arc(?:min|sec)\b|mbar\b|min\b|[shNSEW]\b)/g,
			`$1${NO_BREAK}$2`
		)
		.replace(/(\d|\)) x (?=\d|[A-Z(])/g, '$1 × ')
		.replace(/(^|[\s(])-(?=\d)/g, '$1−')
		.replace(/ - (?=\S)/g, ' − ');
}
