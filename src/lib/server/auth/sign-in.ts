import { redirect, type RequestEvent } from '@sveltejs/kit';
import { AuthError } from '@auth/sveltekit';
import { AppError } from '../errors';
import { SecondStepNeeded, beginSecondStep } from './second-step';
import { signIn, signOut } from '.';

/** Where to go after sign-in: a path of ours, never an address that somebody put into a link. */
export function safeReturnPath(to: string | null): string {
	return to !== null && /^\/(?![/\\])[^\s\\]*$/.test(to) ? to : '/';
}

type Credentials =
	| { provider: 'password'; email: string; password: string }
	| { provider: 'link'; token: string }
	| { provider: 'second-step'; token: string; code: string };

const REFUSALS: Record<Credentials['provider'], string> = {
	password: 'The e-mail or the password is not right.',
	link: 'This link has been used or is too old. Ask for a new one.',
	'second-step': 'This code is not right, or it was used already. Wait for the next one.'
};

async function askSecondStep(
	{ cookies }: RequestEvent,
	{ personId }: SecondStepNeeded,
	to: string
): Promise<never> {
	await beginSecondStep(cookies, personId);
	redirect(303, `/sign-in/second-step${to === '/' ? '' : `?to=${encodeURIComponent(to)}`}`);
}

/** Signs in and redirects; answers with one sentence when that fails, the same for every reason. */
export async function signInWith(event: RequestEvent, credentials: Credentials, to: string): Promise<string> {
	const { provider, ...fields } = credentials;
	const body = new URLSearchParams({ ...fields, providerId: provider, redirectTo: to });
	const headers = new Headers(event.request.headers);
	headers.set('content-type', 'application/x-www-form-urlencoded');
	headers.delete('content-length');
	const request = new Request(event.url, { method: 'POST', headers, body });
	try {
		await signIn(Object.create(event, { request: { value: request } }) as RequestEvent);
	} catch (error) {
		if (!(error instanceof AuthError)) throw error;
		const cause = error.cause?.err;
		if (cause instanceof SecondStepNeeded) return askSecondStep(event, cause, to);
		return cause instanceof AppError ? cause.message : REFUSALS[provider];
	}
	return '';
}

/** Ends the session in the database and on this device. What the device kept for itself is cleared as well. */
export async function endSession(event: RequestEvent): Promise<void> {
	event.setHeaders({ 'clear-site-data': '"storage"' });
	const headers = new Headers(event.request.headers);
	headers.set('content-type', 'application/x-www-form-urlencoded');
	headers.delete('content-length');
	const body = new URLSearchParams({ redirectTo: '/sign-in' });
	const request = new Request(event.url, { method: 'POST', headers, body });
	await signOut(Object.create(event, { request: { value: request } }) as RequestEvent);
}
