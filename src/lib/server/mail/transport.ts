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

/** Shorter than an outbox claim, so that one slow server does not make two processes send the same letter. */
const PATIENCE_MS = 10_000;

let transporter: Transporter | undefined;

/** Mail programs show a button of their own that stops such letters with one press (RFC 2369, RFC 8058). */
const stopHeaders = (stopUrl: string) => ({
	'List-Unsubscribe': `<${stopUrl}>`,
	'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click'
});

/** Hands one letter to the mail server; resolves once the server has taken it. */
export async function deliver(letter: Letter): Promise<void> {
	const { messageId, recipient, replyTo, stopUrl, subject, textBody, htmlBody } = letter;
	transporter ??= createTransport({
		url: env().SMTP_URL,
		connectionTimeout: PATIENCE_MS,
		greetingTimeout: PATIENCE_MS,
		socketTimeout: PATIENCE_MS,
		disableFileAccess: true,
		disableUrlAccess: true
	});
	await transporter.sendMail({
		messageId,
		from: env().MAIL_FROM,
		to: recipient,
		...(replyTo ? { replyTo } : {}),
		...(stopUrl ? { headers: stopHeaders(stopUrl) } : {}),
		subject,
		text: textBody,
		html: htmlBody,
		attachments: await listPictures(htmlBody)
	});
}

export function closeTransport(): void {
	transporter?.close();
	transporter = undefined;
}
