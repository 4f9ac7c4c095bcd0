import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import type { RerunAnswer, RerunTask } from './rerun-inputs';
import { WorkerPool } from './worker-pool';

/** A thread does not take over how the process reads TypeScript: it learns that first. */
const READ_SOURCE = `
	const { workerData } = require('node:worker_threads');
	import('tsx/esm/api').then(({ register }) => {
		register();
		return import(workerData);
	});
`;

/** The built application has the thread's program beside its own; otherwise it runs from its source. */
function openThread(): Worker {
	if (import.meta.env?.PROD) return new Worker(join(process.cwd(), 'build', 'threads', 'rerun-worker.js'));
	const workerData = new URL('./rerun-worker.ts', import.meta.url).href;
	return new Worker(READ_SOURCE, { eval: true, workerData });
}

export const openRerunThreads = (): WorkerPool<RerunTask, RerunAnswer> =>
	new WorkerPool(openThread, availableParallelism());
