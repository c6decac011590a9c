/**
 * Whether a request that a cookie may vouch for was made up on a page of ours. Where ORIGIN is
 * given, by that alone. Where it is not, by the host that the browser asked: a page of somebody
 * else's can neither choose the `Host` header of a request nor its own `Origin`.
 */
export function isOwnOrigin(
	said: string | null,
	{ origin, host }: { readonly origin: string | undefined; readonly host: string | null }
): boolean {
	if (said === null) return false;
	if (origin !== undefined) return said === origin;
	return host !== null && (said === `http://${host}` || said === `https://${host}`);
}
