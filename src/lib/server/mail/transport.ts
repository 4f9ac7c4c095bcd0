import { createTransport, type Transporter } from 'nodemailer';
import { env } from '../env';

export interface Letter {
	messageId: string;
	recipient: string;
	subject: string;
	textBody: string;
	htmlBody: string;
}

let transporter: Transporter | undefined;

/** Hands one letter to the mail server; resolves once the server has taken it. */
export async function deliver({ messageId, recipient, subject, textBody, htmlBody }: Letter): Promise<void> {
	transporter ??= createTransport(env().SMTP_URL, { connectionTimeout: 10_000, greetingTimeout: 10_000 });
	await transporter.sendMail({
		messageId,
		from: env().MAIL_FROM,
		to: recipient,
		subject,
		text: textBody,
		html: htmlBody
	});
}
