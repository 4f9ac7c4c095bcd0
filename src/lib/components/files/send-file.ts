/** What became of one sending: kept, refused in words, or broken off on the way, which may be tried again. */
export type Sent =
	| { kind: 'kept'; /** What was answered. */ text?: string }
	| { kind: 'refused'; sentence: string }
	| { kind: 'broken'; sentence: string };

export interface Sending {
	/** From 0 to 1, of what has left this device. */
	onShare: (share: number) => void;
	signal: AbortSignal;
	/** The same for every try, so that a file that did arrive is not kept twice. */
	key: string;
}

export type SendFile = (path: string, file: File, sending: Sending) => Promise<Sent>;

const NO_ANSWER = 'The workshop could not be reached.';
/** Too much at once, or a server that is starting again: the same file may well be taken later. */
const MAY_PASS = (status: number): boolean => status === 429 || status >= 500;

function readDetail(text: string): string {
	try {
		return String((JSON.parse(text) as { detail?: unknown }).detail ?? '');
	} catch {
		return '';
	}
}

function tell({ status, responseText }: XMLHttpRequest): Sent {
	if (status >= 200 && status < 300) return { kind: 'kept', text: responseText };
	const sentence = readDetail(responseText) || `The workshop answered with ${status}.`;
	return { kind: MAY_PASS(status) ? 'broken' : 'refused', sentence };
}

/** Sends one file as the body of a request. Not `fetch`, which cannot say how much has left. */
export const sendFile: SendFile = (path, file, { onShare, signal, key }) =>
	new Promise((resolve) => {
		const request = new XMLHttpRequest();
		request.open('POST', path);
		request.setRequestHeader('content-type', 'application/octet-stream');
		request.setRequestHeader('idempotency-key', key);
		request.upload.onprogress = ({ loaded, total }) => onShare(total > 0 ? loaded / total : 0);
		request.onload = () => resolve(tell(request));
		request.onerror = request.onabort = () => resolve({ kind: 'broken', sentence: NO_ANSWER });
		signal.addEventListener('abort', () => request.abort(), { once: true });
		request.send(file);
	});
