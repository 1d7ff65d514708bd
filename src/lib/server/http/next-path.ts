/** Where to go after signing in: only to a path of this site, so that a link can't lead people astray. */
export function nextPath(url: URL, otherwise = '/projects'): string {
	const next = url.searchParams.get('next');
	if (!next || !next.startsWith('/') || next.startsWith('//') || next.includes('\\')) return otherwise;
	// A tab or line break inside is dropped by browsers, which would turn "/<tab>/host" into another site.
	return [...next].some((letter) => letter.charCodeAt(0) < 33) ? otherwise : next;
}
