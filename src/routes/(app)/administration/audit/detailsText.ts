const SHA256 = /^[0-9a-f]{64}$/;
const SHOWN = 12;

/** What an audit row says beside its subject, as one line; of a hash its first twelve characters. */
export function detailsText(details: unknown): string {
	if (Array.isArray(details)) return details.map(detailsText).join(', ');
	if (typeof details === 'object' && details !== null)
		return Object.entries(details)
			.map(([name, value]) => `${name} ${detailsText(value)}`)
			.join(', ');
	if (typeof details === 'string')
		return SHA256.test(details) ? `${details.slice(0, SHOWN)}…` : details;
	return details === undefined || details === null ? '–' : JSON.stringify(details);
}
