/** Headers that every answer carries. The policy for scripts and pictures is the framework's (svelte.config.js). */
const always: Record<string, string> = {
	'x-content-type-options': 'nosniff',
	'x-frame-options': 'DENY',
	'referrer-policy': 'same-origin',
	'cross-origin-opener-policy': 'same-origin',
	'cross-origin-resource-policy': 'same-origin',
	'permissions-policy': 'camera=(), microphone=(), geolocation=(self), payment=(), usb=(), display-capture=()'
};

/** What is no page loads nothing and sits in no frame. */
const dataPolicy = "default-src 'none'; frame-ancestors 'none'";

export function secure(response: Response, url: URL, requestId: string): Response {
	const { headers } = response;
	for (const [name, value] of Object.entries(always)) headers.set(name, value);
	headers.set('x-request-id', requestId);
	if (url.protocol === 'https:')
		headers.set('strict-transport-security', 'max-age=31536000; includeSubDomains');
	const type = headers.get('content-type') ?? '';
	if (/^application\/(problem\+)?json/.test(type) && !headers.has('content-security-policy'))
		headers.set('content-security-policy', dataPolicy);
	if (type.startsWith('text/html') && !headers.has('cache-control'))
		headers.set('cache-control', 'private, no-store');
	return response;
}
