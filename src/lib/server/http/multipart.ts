import { AppError } from '../errors';

/** Names of fields and files, and what they are; more is not a form of ours. */
const MOST_HEADER_BYTES = 8 * 1024;
const LINE_END = '\r\n';
const HEADERS_END = '\r\n\r\n';

/** One thing after the other: a field or file begins, some of its bytes, it ends. */
export type FormEvent =
	| { kind: 'begin'; field: string; fileName: string | null }
	| { kind: 'bytes'; bytes: Uint8Array }
	| { kind: 'end' };

const malformed = (what: string): AppError => new AppError('malformed_request', what);

export function boundaryOf(contentType: string): string | null {
	if (!/^multipart\/form-data\s*;/i.test(contentType)) return null;
	const [, quoted, plain] = /;\s*boundary=(?:"([^"]{1,70})"|([^\s;]{1,70}))/i.exec(contentType) ?? [];
	return quoted ?? plain ?? null;
}

/** Browsers write line ends and quotes in names as per cent codes. */
const decodeName = (name: string): string =>
	name.replace(/%0D|%0A|%22/gi, (code) => String.fromCharCode(parseInt(code.slice(1), 16)));

function readHeaders(text: string): { field: string; fileName: string | null } {
	const disposition = /^content-disposition:(.*)$/im.exec(text)?.[1] ?? '';
	const parameter = (name: string): string | undefined =>
		new RegExp(`[;\\s]${name}="([^"]*)"`, 'i').exec(disposition)?.[1];
	const field = parameter('name');
	if (field === undefined) throw malformed('A part of the form has no name.');
	const fileName = parameter('filename');
	return { field: decodeName(field), fileName: fileName === undefined ? null : decodeName(fileName) };
}

type State = 'before' | 'after-delimiter' | 'headers' | 'inside' | 'over';

/** Holds what has come in and cannot be told apart yet: a piece, and as much as a boundary is long. */
class FormSplitter {
	private readonly delimiter: Buffer;
	// The first boundary stands at the very beginning, without the line end before it that the others have.
	private held: Buffer = Buffer.from(LINE_END);
	private state: State = 'before';

	constructor(boundary: string) {
		this.delimiter = Buffer.from(`${LINE_END}--${boundary}`, 'latin1');
	}

	get isOver(): boolean {
		return this.state === 'over';
	}

	*take(piece: Uint8Array): Generator<FormEvent> {
		if (this.isOver) return;
		this.held = Buffer.concat([this.held, piece]);
		while (yield* this.step());
	}

	/** Says whether there may be more to tell of what is held. */
	private *step(): Generator<FormEvent, boolean> {
		if (this.state === 'over') return false;
		if (this.state === 'headers') return yield* this.takeHeaders();
		if (this.state === 'after-delimiter') return this.passDelimiter();
		return yield* this.takeContent();
	}

	private *takeContent(): Generator<FormEvent, boolean> {
		const { held, delimiter } = this;
		const at = held.indexOf(delimiter);
		const until = at === -1 ? Math.max(held.length - delimiter.length + 1, 0) : at;
		const isInside = this.state === 'inside';
		if (isInside && until > 0) yield { kind: 'bytes', bytes: held.subarray(0, until) };
		this.held = held.subarray(at === -1 ? until : at + delimiter.length);
		if (at === -1) return false;
		if (isInside) yield { kind: 'end' };
		this.state = 'after-delimiter';
		return true;
	}

	private passDelimiter(): boolean {
		if (this.held.length < LINE_END.length) return false;
		const next = this.held.toString('latin1', 0, LINE_END.length);
		if (next !== '--' && next !== LINE_END) throw malformed('The form is not parted as it says.');
		this.state = next === '--' ? 'over' : 'headers';
		this.held = this.held.subarray(LINE_END.length);
		return true;
	}

	private *takeHeaders(): Generator<FormEvent, boolean> {
		const at = this.held.indexOf(HEADERS_END);
		if (at > MOST_HEADER_BYTES || (at === -1 && this.held.length > MOST_HEADER_BYTES)) {
			throw malformed('The head of a part of the form is too long.');
		}
		if (at === -1) return false;
		yield { kind: 'begin', ...readHeaders(this.held.toString('utf8', 0, at)) };
		this.held = this.held.subarray(at + HEADERS_END.length);
		this.state = 'inside';
		return true;
	}
}

/**
 * Takes a form apart as it comes in (RFC 7578): never more of it is held than a piece and a boundary, however large the
 * files in it are.
 */
export async function* splitForm(
	pieces: AsyncIterable<Uint8Array>,
	boundary: string
): AsyncGenerator<FormEvent> {
	const splitter = new FormSplitter(boundary);
	for await (const piece of pieces) yield* splitter.take(piece);
	if (!splitter.isOver) throw malformed('The form breaks off before its end.');
}
