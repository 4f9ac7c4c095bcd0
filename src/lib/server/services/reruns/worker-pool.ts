import { Worker } from 'node:worker_threads';

interface Waiting<Task, Answer> {
	task: Task;
	resolve: (answer: Answer) => void;
	reject: (error: Error) => void;
}

/** Threads that each do one task at a time; tasks wait for the next that is free. A thread that dies is an error of its task. */
export class WorkerPool<Task, Answer> {
	private readonly free: Worker[] = [];
	private readonly all = new Set<Worker>();
	private readonly queue: Waiting<Task, Answer>[] = [];
	private isClosed = false;

	constructor(
		private readonly open: () => Worker,
		private readonly size: number
	) {}

	run(task: Task): Promise<Answer> {
		if (this.isClosed) return Promise.reject(new Error('The threads were stopped.'));
		return new Promise((resolve, reject) => {
			this.queue.push({ task, resolve, reject });
			this.next();
		});
	}

	/** Stops every thread; what was not finished is refused. */
	async close(): Promise<void> {
		this.isClosed = true;
		for (const { reject } of this.queue.splice(0)) reject(new Error('The threads were stopped.'));
		await Promise.all([...this.all].map((worker) => worker.terminate()));
	}

	private take(): Worker | null {
		const idle = this.free.pop();
		if (idle) return idle;
		if (this.all.size >= this.size) return null;
		const worker = this.open();
		this.all.add(worker);
		// Waiting for work must not keep the process up.
		worker.unref();
		return worker;
	}

	private next(): void {
		const worker = this.queue.length > 0 ? this.take() : null;
		if (worker) this.give(worker, this.queue.shift()!);
	}

	private give(worker: Worker, { task, resolve, reject }: Waiting<Task, Answer>): void {
		// Its own alone: the thread listens to itself, too.
		const settle = (): void => {
			worker.off('message', succeed).off('error', fail).off('exit', end);
			this.next();
		};
		const succeed = (answer: Answer): void => {
			this.free.push(worker);
			settle();
			resolve(answer);
		};
		const fail = (error: Error): void => {
			this.all.delete(worker);
			settle();
			reject(error);
		};
		const end = (code: number): void => fail(new Error(`The thread ended with ${code}.`));
		worker.on('message', succeed).on('error', fail).on('exit', end);
		worker.postMessage(task);
	}
}
