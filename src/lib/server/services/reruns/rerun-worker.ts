import { parentPort } from 'node:worker_threads';
import { rerunInputs, type RerunTask } from './rerun-inputs';

// A thread that assesses again what it is sent, one after the other.
parentPort?.on('message', (task: RerunTask) => parentPort?.postMessage(rerunInputs(task)));
