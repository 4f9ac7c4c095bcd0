import { z } from 'zod';

const port = z.coerce.number().int().min(1).max(65535);

const envSchema = z.object({
	ORIGIN: z.url().default('http://localhost:4173'),
	AUTH_SECRET: z.string().min(32),
	SOAKLINE_SECRET: z.string().min(32),
	DATABASE_HOST: z.string().default('127.0.0.1'),
	DATABASE_PORT: port,
	DATABASE_NAME: z.string().default('soakline'),
	DATABASE_USER: z.string().default('soakline'),
	DATABASE_PASSWORD: z.string(),
	SMTP_URL: z.string().startsWith('smtp'),
	MAIL_FROM: z.string().default('Soakline <soakline@localhost>'),
	MAILBOX_DIR: z.string().optional(),
	/** Where photos and documents are kept. */
	SOAKLINE_FILES_DIR: z.string().min(1).default('.soakline/files'),
	SOAKLINE_DEMO: z.enum(['0', '1']).default('0'),
	/** How hard outlooks are worked out: `light` for machines that have no time for more. */
	SOAKLINE_OUTLOOK: z.enum(['full', 'light']).default('full')
});

export type Env = z.infer<typeof envSchema>;

let cached: Env | undefined;

/** Settings of this process, checked once; throws one sentence that names what is missing or wrong. */
export function env(): Env {
	if (cached) return cached;
	const parsed = envSchema.safeParse(process.env);
	if (!parsed.success) {
		const first = parsed.error.issues[0];
		throw new Error(`The setting ${String(first?.path[0])} is missing or wrong: ${first?.message}.`);
	}
	cached = parsed.data;
	return cached;
}

export function isSecureOrigin(): boolean {
	return env().ORIGIN.startsWith('https://');
}
