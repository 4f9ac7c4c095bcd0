import { Readable } from 'node:stream';
import { createTransport, type Transporter } from 'nodemailer';
import { env } from '../env';
import { listPictures } from './letterhead';

export interface Letter {
	messageId: string;
	recipient: string;
	/** Whom an answer reaches; empty for the sender. */
	replyTo?: string;
	/** Where its reader can stop letters of its kind; empty for letters that nobody stops. */
	stopUrl?: string;
	subject: string;
	textBody: string;
	htmlBody: string;
}

/** How long a server may take to greet, and to answer: shorter than an outbox claim. */
const GREETING_MS = 10_000;
const ANSWER_MS = 45_000;

/** Mail programs show a button of their own that stops such letters with one press (RFC 2369, RFC 8058). */
const stopHeaders = (stopUrl: string) => ({
	'List-Unsubscribe': `<${stopUrl}>`,
	'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click'
});

async function* withholdEnd(words: Readable, beforeEnd: () => Promise<void>): AsyncGenerator<Buffer> {
	yield* words;
	await beforeEnd();
}

/** A server takes a letter by its end and drops one without (RFC 5321, 4.1.1.4 and 4.2.5): the end waits for `beforeEnd`. */
function connect(beforeEnd: () => Promise<void>): Transporter {
	const transporter = createTransport({
		url: env().SMTP_URL,
		connectionTimeout: GREETING_MS,
		greetingTimeout: GREETING_MS,
		socketTimeout: ANSWER_MS,
		disableFileAccess: true,
		disableUrlAccess: true
	});
	transporter.use('stream', ({ message }, done) => {
		message.processFunc((words) => Readable.from(withholdEnd(words, beforeEnd), { objectMode: false }));
		done();
	});
	return transporter;
}

const ADDRESS = /<([^<>]+)>\s*$/;

/** Readers know the shop, not the program that sends for it. */
function senderFor(shopName: string): { name: string; address: string } {
	const { MAIL_FROM } = env();
	return { name: shopName, address: ADDRESS.exec(MAIL_FROM)?.[1] ?? MAIL_FROM.trim() };
}

/**
 * Hands one letter to the mail server in a shop's name; resolves once the server has taken it, and fails untaken if
 * `beforeEnd` does.
 */
export async function deliver(
	letter: Letter,
	shopName: string,
	beforeEnd: () => Promise<void>
): Promise<void> {
	const { messageId, recipient, replyTo, stopUrl, subject, textBody, htmlBody } = letter;
	await connect(beforeEnd).sendMail({
		messageId,
		from: senderFor(shopName),
		to: recipient,
		...(replyTo ? { replyTo } : {}),
		...(stopUrl ? { headers: stopHeaders(stopUrl) } : {}),
		subject,
		text: textBody,
		html: htmlBody,
		attachments: await listPictures(htmlBody)
	});
}
