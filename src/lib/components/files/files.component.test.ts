import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { flushSync } from 'svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { FileQueue, WAITS_MS } from './file-queue.svelte';
import FileQueueList from './FileQueueList.svelte';
import type { SendFile, Sending, Sent } from './send-file';

const photo = (name: string): File => new File(['light'], name, { type: 'image/jpeg' });
const BROKEN: Sent = { kind: 'broken', sentence: 'The workshop could not be reached.' };

interface Try {
	path: string;
	sending: Sending;
	answer: (sent: Sent) => Promise<void>;
}

/** A queue whose sendings end when, and as, the test says. */
function begin() {
	const tries: Try[] = [];
	const waits: number[] = [];
	const onDone = vi.fn();
	const send: SendFile = (path, _, sending) =>
		new Promise((resolve) => {
			const answer = async (sent: Sent) => {
				resolve(sent);
				await new Promise((later) => setTimeout(later));
				flushSync();
			};
			sending.signal.addEventListener('abort', () => resolve(BROKEN));
			tries.push({ path, sending, answer });
		});
	const wait = (ms: number) => Promise.resolve(void waits.push(ms));
	const queue = new FileQueue('once', { mostBytes: 100, send, wait, onDone });
	render(FileQueueList, { queue });
	const add = (...names: string[]) => {
		queue.add(names.map(photo), '/files');
		flushSync();
	};
	return { queue, tries, waits, onDone, add, last: () => tries.at(-1)! };
}

afterEach(cleanup);

describe('files on their way', () => {
	it('go one after another, each under a key and a name of its own', async () => {
		const { tries, add, last, onDone } = begin();
		add('left.jpg', 'right & rear.jpg');
		expect(tries).toHaveLength(1);
		await last().answer({ kind: 'kept' });
		expect(tries.map(({ path }) => path)).toEqual([
			'/files?fileName=left.jpg',
			'/files?fileName=right%20%26%20rear.jpg'
		]);
		expect(new Set(tries.map(({ sending }) => sending.key)).size).toBe(2);
		expect(onDone).not.toHaveBeenCalled();
		expect(screen.getByText('1 of 2 done.')).toBeTruthy();
		await last().answer({ kind: 'kept' });
		expect(onDone).toHaveBeenCalledOnce();
		expect(screen.getByText('2 files were kept.')).toBeTruthy();
	});

	it('say how much of them has left', () => {
		const { add, last } = begin();
		add('left.jpg');
		last().sending.onShare(0.4);
		flushSync();
		expect((screen.getByRole('progressbar') as HTMLProgressElement).value).toBe(0.4);
	});

	it('are tried again under the same key when they break off, and at last by hand', async () => {
		const { tries, waits, add, last } = begin();
		add('left.jpg');
		for (const at of [...WAITS_MS, null].keys()) {
			expect(tries).toHaveLength(at + 1);
			await last().answer(BROKEN);
		}
		expect(waits).toEqual(WAITS_MS);
		expect(screen.getByText(/Not kept\. The workshop could not be reached\./)).toBeTruthy();
		await fireEvent.click(screen.getByRole('button', { name: 'Try again with left.jpg' }));
		await last().answer({ kind: 'kept' });
		expect(screen.getByText('One file was kept.')).toBeTruthy();
		expect(new Set(tries.map(({ sending }) => sending.key)).size).toBe(1);
	});

	it('are not tried again when they were refused, and say why', async () => {
		const { tries, add, last } = begin();
		add('notes.jpg', 'left.jpg');
		await last().answer({ kind: 'refused', sentence: '“notes.jpg” is text.' });
		expect(tries).toHaveLength(2);
		await last().answer({ kind: 'kept' });
		expect(screen.getByText('“notes.jpg” is text.')).toBeTruthy();
		expect(screen.queryByRole('button')).toBeNull();
	});

	it('are not sent when they are larger than what is taken', async () => {
		const { tries, queue } = begin();
		queue.add([new File(['x'.repeat(101)], 'film.jpg'), photo('left.jpg')], '/files');
		flushSync();
		expect(tries.map(({ path }) => path)).toEqual(['/files?fileName=left.jpg']);
		expect(screen.getByText(/^“film\.jpg” is larger than/)).toBeTruthy();
	});

	it('can be called off, one under way and one that waits', async () => {
		const { tries, add, queue } = begin();
		add('left.jpg', 'right.jpg', 'rear.jpg');
		await fireEvent.click(screen.getByRole('button', { name: 'Call off right.jpg' }));
		await fireEvent.click(screen.getByRole('button', { name: 'Call off left.jpg' }));
		await vi.waitFor(() => expect(tries).toHaveLength(2));
		expect(tries[0]!.sending.signal.aborted).toBe(true);
		expect(tries[1]!.path).toContain('rear.jpg');
		expect(queue.files.map(({ state }) => state)).toEqual(['cancelled', 'cancelled', 'sending']);
	});
});
