import type { ActionResult } from '@sveltejs/kit';

export const SIGNED_OUT =
	'You are signed out, and nothing was saved. What you typed still stands here: sign in again in another tab, where it says why, then send this once more.';

/** Whether an answer leads away to the sign-in page because nobody is signed in any more. */
export function isSignedOut(result: ActionResult, here: string): boolean {
	if (result.type !== 'redirect') return false;
	const { pathname, searchParams } = new URL(result.location, here);
	return pathname === '/sign-in' && searchParams.has('to');
}
