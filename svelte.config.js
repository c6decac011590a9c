import adapter from '@sveltejs/adapter-node';
import { vitePreprocess } from '@sveltejs/vite-plugin-svelte';

/** @type {import('@sveltejs/kit').Config} */
export default {
	preprocess: vitePreprocess(),
	kit: {
		adapter: adapter({ out: 'build' }),
		alias: {
			// The package's own index pulls in every validator it knows; Platen uses one.
			'superforms-zod': 'node_modules/sveltekit-superforms/dist/adapters/zod4'
		},
		// Platen checks the origin of every cookie request itself, whatever its content type, and lets
		// bearer requests come from anywhere: see hooks.server.ts.
		csrf: { trustedOrigins: ['*'] },
		csp: {
			mode: 'nonce',
			directives: {
				'default-src': ['none'],
				'script-src': ['self'],
				'style-src': ['self', 'unsafe-inline'],
				'img-src': ['self', 'data:', 'blob:'],
				'font-src': ['self'],
				'connect-src': ['self'],
				'object-src': ['none'],
				'frame-src': ['self'],
				'base-uri': ['none'],
				'form-action': ['self'],
				'frame-ancestors': ['self'],
				'manifest-src': ['self'],
				'worker-src': ['self', 'blob:']
			}
		}
	}
};
