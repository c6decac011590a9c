/** What one layer may import: places of ours, then packages. */
export interface Layer {
	/** The files it speaks of; the first layer that matches a file is the file's. */
	readonly files: RegExp;
	readonly own: RegExp;
	readonly packages: RegExp;
}

const NODE = 'node:';
const NUMERIC = 'json-canonicalize|papaparse';

/** The folders of core from the ground up: each may import those before it, never backwards. */
export const CORE_ORDER = [
	'units',
	'stats',
	'characteristics',
	'measurements',
	'junction',
	'distributions',
	'limits',
	'outline',
	'template',
	'datasheet',
	'review'
] as const;

/** The allow-list of who may import whom. */
export const LAYERS: Readonly<Record<string, Layer>> = {
	core: {
		files: /^src\/lib\/core\//,
		own: /^src\/lib\/core\//,
		packages: new RegExp(`^(zod|${NUMERIC})$`)
	},
	plot: {
		files: /^src\/lib\/plot\//,
		own: /^src\/lib\/(core|plot)\//,
		packages: /^vega/
	},
	forms: {
		files: /^src\/lib\/forms\//,
		own: /^src\/lib\/(core|forms)\//,
		packages: /^zod$/
	},
	'components/ui': {
		files: /^src\/lib\/components\/ui\//,
		own: /^src\/lib\/components\/ui\//,
		packages: /^(svelte|svelte\/.*|\$app\/.*|vega.*)$/
	},
	components: {
		files: /^src\/lib\/components\//,
		own: /^src\/lib\/(core|plot|forms|components)\//,
		packages: /^(svelte|svelte\/.*|\$app\/.*|sveltekit-superforms.*)$/
	},
	'server/config': {
		files: /^src\/lib\/server\/(config|logging|problem)\.ts$/,
		own: /^src\/lib\/(core|server\/(config|logging|problem))/,
		packages: new RegExp(`^(zod|pino|${NODE}.*)$`)
	},
	'server/db': {
		files: /^src\/lib\/server\/db\//,
		own: /^src\/lib\/(core|server\/db)\//,
		packages: new RegExp(`^(drizzle-orm.*|@libsql/client|zod|${NODE}.*)$`)
	},
	'server/auth, storage': {
		files: /^src\/lib\/server\/(auth|storage)\//,
		own: /^src\/lib\/(core|server\/(auth|storage|config|logging|problem|db))(\/|$)/,
		packages: new RegExp(
			`^(lucia|@lucia-auth/.*|@node-rs/argon2|rate-limiter-flexible|drizzle-orm.*|zod|@sveltejs/kit|${NODE}.*)$`
		)
	},
	'server/pdf': {
		files: /^src\/lib\/server\/pdf\//,
		own: /^src\/lib\/(core|plot|server\/pdf)\//,
		packages: new RegExp(`^(pdf-lib|@pdf-lib/fontkit|@expo-google-fonts/.*|vega.*|${NODE}.*)$`)
	},
	'worker entry': {
		files: /^src\/lib\/server\/work\/(worker|handlers)\.ts$/,
		own: /^src\/lib\/(core|server)\//,
		packages: new RegExp(`^(zod|${NODE}.*)$`)
	},
	'server/work': {
		files: /^src\/lib\/server\/work\//,
		own: /^src\/lib\/(core|server\/(work\/(?!worker|handlers)|config|logging|db|storage))/,
		packages: new RegExp(`^(drizzle-orm|zod|${NODE}.*)$`)
	},
	'server/services': {
		files: /^src\/lib\/server\/services\//,
		own: /^src\/lib\/(core|plot|server\/(?!work\/)|server\/work\/(enqueue|stores|jobHandler|job))/,
		packages: new RegExp(`^(drizzle-orm|zod|${NODE}.*)$`)
	},
	params: { files: /^src\/params\//, own: /^src\/lib\/core\//, packages: /^@sveltejs\/kit$/ },
	routes: {
		files: /^src\/routes\//,
		own: /^src\/(app\.css|routes\/|lib\/(core|plot|forms|components)\/|lib\/server\/(services|db|auth)\/|lib\/server\/(problem|config))/,
		packages: new RegExp(
			`^(@sveltejs/kit|svelte|svelte/.*|sveltekit-superforms.*|superforms-zod|zod|\\$app/.*|\\./\\$types|${NODE}.*)$`
		)
	},
	'composition roots': {
		files: /^src\/(hooks\.server\.ts|app\.d\.ts|tasks\/|lib\/server\/(application|auditHead)\.ts)/,
		own: /^src\/(lib\/(core|server)|tasks)\//,
		packages: /.*/
	}
};

/** What no file may import, whatever its layer says. */
export const NOBODY = /^src\/(routes|hooks\.server)/;
