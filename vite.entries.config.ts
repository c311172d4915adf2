import path from 'node:path';
import { defineConfig } from 'vite';

/**
 * Second build, run after kit's (which empties build/): the workers, which kit's own server build cannot hold.
 * Packages stay outside, in node_modules.
 */
export default defineConfig({
	resolve: { alias: { $lib: path.resolve('src/lib') } },
	build: {
		ssr: true,
		outDir: 'build/entries',
		emptyOutDir: true,
		target: 'node20',
		rollupOptions: {
			input: {
				inferenceWorker: 'src/lib/server/inference/worker.ts',
				intakeWorker: 'src/lib/server/intake/worker.ts'
			},
			output: { entryFileNames: '[name].js' }
		}
	}
});
