import { resolve } from 'node:path';
import { defineConfig } from 'vite';

/** The second build: what runs beside the server, as a worker thread or from the command line. */
export default defineConfig({
	resolve: { alias: { $lib: resolve('src/lib') } },
	publicDir: false,
	build: {
		ssr: true,
		outDir: 'build/tasks',
		emptyOutDir: true,
		target: 'node20',
		sourcemap: true,
		rolldownOptions: {
			input: {
				worker: 'src/lib/server/work/worker.ts',
				seed: 'src/tasks/seed.ts',
				token: 'src/tasks/token.ts',
				generate: 'src/tasks/generate.ts',
				confidence: 'src/tasks/confidence.ts'
			}
		}
	}
});
