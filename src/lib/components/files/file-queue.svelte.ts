import { refuseLarge, sayRefused } from '../../format/files';
import { sendFile, type SendFile } from './send-file';

export type FileState = 'waiting' | 'sending' | 'again' | 'kept' | 'refused' | 'broken' | 'cancelled';

/** A file on its way. */
export class QueuedFile {
	state = $state<FileState>('waiting');
	/** How much of it has left this device, from 0 to 1. */
	share = $state(0);
	/** Why it was not kept. */
	sentence = $state('');
	readonly stop = new AbortController();

	constructor(
		readonly key: string,
		readonly file: File,
		readonly path: string
	) {}
}

/** Waits between the tries of a file that broke off: a dead spot is often behind the next shed. */
export const WAITS_MS: readonly number[] = [1_000, 4_000, 12_000];

const UNDER_WAY: readonly FileState[] = ['waiting', 'sending', 'again'];
export const isUnderWay = ({ state }: QueuedFile): boolean => UNDER_WAY.includes(state);

interface Means {
	/** What is larger is refused before it is sent. */
	mostBytes?: number;
	send?: SendFile;
	wait?: (ms: number) => Promise<void>;
	/** After the last one under way has come to its end. */
	onDone: () => void;
}

/** Sends files one after another, tries again what breaks off, and lets each be called off or tried anew. */
export class FileQueue {
	files = $state<QueuedFile[]>([]);
	private isRunning = false;
	private count = 0;
	private readonly means: Required<Means>;

	constructor(
		private readonly onceKey: string,
		means: Means
	) {
		const wait = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));
		this.means = { mostBytes: Infinity, send: sendFile, wait, ...means };
	}

	get underWay(): number {
		return this.files.filter(isUnderWay).length;
	}

	get kept(): number {
		return this.files.filter(({ state }) => state === 'kept').length;
	}

	/** Each goes to the path with its name, and with what all of them belong to. */
	add(files: Iterable<File>, path: string, place: Readonly<Record<string, unknown>> = {}): void {
		for (const file of files) {
			const query = Object.entries({ ...place, fileName: file.name })
				.map(([name, value]) => `${name}=${encodeURIComponent(String(value))}`)
				.join('&');
			const queued = new QueuedFile(`${this.onceKey}-${(this.count += 1)}`, file, `${path}?${query}`);
			if (file.size > this.means.mostBytes) {
				queued.state = 'refused';
				queued.sentence = sayRefused(file.name, refuseLarge(this.means.mostBytes));
			}
			this.files.push(queued);
		}
		void this.run();
	}

	/** Calls off one that is not yet kept. */
	cancel(queued: QueuedFile): void {
		if (!isUnderWay(queued)) return;
		queued.state = 'cancelled';
		queued.stop.abort();
	}

	/** Sends one anew, under its old key, that broke off every time. */
	tryAgain(queued: QueuedFile): void {
		if (queued.state !== 'broken') return;
		queued.state = 'waiting';
		void this.run();
	}

	private async run(): Promise<void> {
		if (this.isRunning) return;
		this.isRunning = true;
		for (;;) {
			const next = this.files.find(({ state }) => state === 'waiting');
			if (!next) break;
			await this.bring(next);
		}
		this.isRunning = false;
		this.means.onDone();
	}

	private async bring(queued: QueuedFile): Promise<void> {
		const { file, path, key, stop } = queued;
		for (const waitMs of [...WAITS_MS, null]) {
			queued.state = 'sending';
			queued.share = 0;
			const onShare = (share: number) => (queued.share = share);
			const sent = await this.means.send(path, file, { onShare, signal: stop.signal, key });
			// What was called off while it was under way stays so, unless it had arrived already.
			if (stop.signal.aborted && sent.kind !== 'kept') return;
			queued.state = sent.kind;
			queued.sentence = sent.kind === 'kept' ? '' : sent.sentence;
			if (sent.kind !== 'broken' || waitMs === null) return;
			queued.state = 'again';
			await this.means.wait(waitMs);
			if (stop.signal.aborted) return;
		}
	}
}
