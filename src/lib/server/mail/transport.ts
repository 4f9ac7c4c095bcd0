import { createTransport, type Transporter } from 'nodemailer';
import { env } from '../env';

export interface Letter {
	messageId: string;
	recipient: string;
	subject: string;
	textBody: string;
	htmlBody: string;
}

/** Shorter than an outbox claim, so that one slow server does not make two processes send the same letter. */
const PATIENCE_MS = 10_000;

let transporter: Transporter | undefined;

/** Hands one letter to the mail server; resolves once the server has taken it. */
export async function deliver({ messageId, recipient, subject, textBody, htmlBody }: Letter): Promise<void> {
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
		subject,
		text: textBody,
		html: htmlBody
	});
}

export function closeTransport(): void {
	transporter?.close();
	transporter = undefined;
}
