import { CredentialsSignin, SvelteKitAuth } from '@auth/sveltekit';
import Credentials from '@auth/core/providers/credentials';
import { signInSchema } from '$lib/schemas/people';
import { Person, SignInLink } from '../db/models';
import { env, isSecureOrigin } from '../env';
import { tokenHash } from '../hash';
import { logger } from '../logger';
import { passwordMatches } from './passwords';
import { giveBack, spend } from './rate-limit';
import { hasSecondFactor } from './second-factor';
import { SecondStepNeeded, passSecondStep } from './second-step';
import { ABSOLUTE_MS, closeSession, openSession } from './sessions';

declare module '@auth/core/types' {
	interface Session {
		sessionSecret?: string;
	}
}

const TRIES_PER_ACCOUNT = 10;
const TRIES_PER_ADDRESS = 100;
const WINDOW_S = 15 * 60;

/** AUTH_URL carries no path and basePath does: the library warns of that on every request, and it is meant so. */
const BASE_PATH_TWICE = 'env-url-basepath-redundant';

/** Forwarded by hooks.server.ts from the connection itself, so that nobody can choose it. */
export const CLIENT_ADDRESS_HEADER = 'x-soakline-client';

const letIn = ({ id, name, email }: Person) => ({ id: String(id), name, email });

/** The first step was right; who has a second factor is not in before it is right too. */
async function letInOrAsk(person: Person) {
	if (await hasSecondFactor(person.id)) throw new SecondStepNeeded(person.id);
	return letIn(person);
}

async function byPassword(credentials: Partial<Record<string, unknown>>, request: Request) {
	const parsed = signInSchema.safeParse(credentials);
	if (!parsed.success) throw new CredentialsSignin();
	const { email, password } = parsed.data;
	const address = request.headers.get(CLIENT_ADDRESS_HEADER) ?? 'unknown';
	const limits = [
		{ name: 'sign-in account', key: email, points: TRIES_PER_ACCOUNT, windowS: WINDOW_S },
		{ name: 'sign-in address', key: address, points: TRIES_PER_ADDRESS, windowS: WINDOW_S }
	];
	for (const limit of limits) await spend(limit);
	const person = await Person.findOne({ where: { email, active: true } });
	if (!(await passwordMatches(password, person?.passwordHash ?? null)) || !person)
		throw new CredentialsSignin();
	for (const limit of limits) await giveBack(limit);
	return letInOrAsk(person);
}

async function byMailedLink(credentials: Partial<Record<string, unknown>>) {
	const hash = tokenHash(String(credentials.token ?? ''));
	const link = await SignInLink.findByPk(hash);
	// Deleting is what uses it up: of two at once only one deletes a row.
	const used = await SignInLink.destroy({ where: { tokenHash: hash } });
	if (!link || used !== 1 || link.expiresAt.getTime() < Date.now()) throw new CredentialsSignin();
	const person = await Person.findOne({ where: { id: link.personId, active: true } });
	if (!person) throw new CredentialsSignin();
	return letInOrAsk(person);
}

async function bySecondStep(credentials: Partial<Record<string, unknown>>) {
	const person = await passSecondStep(String(credentials.token ?? ''), String(credentials.code ?? ''));
	if (!person) throw new CredentialsSignin();
	return letIn(person);
}

export const { handle, signIn, signOut } = SvelteKitAuth(() => {
	const secure = isSecureOrigin();
	const credentials = { email: {}, password: {}, token: {}, code: {} };
	return Promise.resolve({
		trustHost: true,
		secret: env().AUTH_SECRET,
		basePath: '/auth',
		session: { strategy: 'jwt' as const, maxAge: ABSOLUTE_MS / 1000 },
		pages: { signIn: '/sign-in', signOut: '/sign-out', error: '/sign-in' },
		cookies: {
			sessionToken: {
				name: secure ? '__Host-soakline' : 'soakline',
				options: { httpOnly: true, sameSite: 'lax' as const, path: '/', secure }
			}
		},
		providers: [
			Credentials({ id: 'password', name: 'Password', credentials, authorize: byPassword }),
			Credentials({ id: 'link', name: 'Mailed link', credentials, authorize: byMailedLink }),
			Credentials({ id: 'second-step', name: 'Second step', credentials, authorize: bySecondStep })
		],
		callbacks: {
			async jwt({ token, user }) {
				if (user?.id) token.sessionSecret = await openSession(Number(user.id));
				return token;
			},
			session({ session, token }) {
				return { ...session, sessionSecret: String(token.sessionSecret ?? '') };
			}
		},
		events: {
			async signOut(message) {
				const secret = 'token' in message ? message.token?.sessionSecret : undefined;
				if (typeof secret === 'string') await closeSession(secret);
			}
		},
		logger: {
			error: (error: Error) => {
				const cause = error.cause as { err?: unknown } | undefined;
				if (error.name === 'CredentialsSignin' || cause?.err instanceof SecondStepNeeded) return;
				logger.error({ err: error.cause ?? error }, 'sign-in failed');
			},
			warn: (code: string) => {
				if (code !== BASE_PATH_TWICE) logger.warn({ code }, 'sign-in warning');
			},
			debug: () => undefined
		}
	});
});
