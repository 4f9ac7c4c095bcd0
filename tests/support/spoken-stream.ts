import { afterEach, beforeEach, vi } from 'vitest';

/** A stream of events that the test speaks into, in the place of EventSource. */
export class SpokenStream extends EventTarget {
	static open: SpokenStream[] = [];
	isClosed = false;
	constructor(readonly url: string) {
		super();
		SpokenStream.open.push(this);
	}
	close(): void {
		this.isClosed = true;
	}
	say(name: string, data: unknown = {}): void {
		this.dispatchEvent(new MessageEvent(name, { data: JSON.stringify(data) }));
	}
}

/** For each test the browser's streams are these, none of them open yet. */
export function useSpokenStreams(): void {
	beforeEach(() => {
		SpokenStream.open = [];
		vi.stubGlobal('EventSource', SpokenStream);
	});
	afterEach(() => {
		vi.unstubAllGlobals();
	});
}
