import { describe, expect, it } from 'vitest';
import { isSignedOut } from './signed-out';

const HERE = 'https://shop.example/places/new';
const redirect = (location: string) => ({ type: 'redirect', status: 303, location }) as const;

describe('an answer that leads to the sign-in page', () => {
	it('is one that asks who is there, and comes back', () => {
		expect(isSignedOut(redirect('/sign-in?to=%2Fplaces%2Fnew'), HERE)).toBe(true);
	});

	it.each(['/places/7', '/sign-in?mailed', '/sign-in/second-step?to=%2Fplaces', '/places?to=/sign-in'])(
		'is not %s',
		(location) => {
			expect(isSignedOut(redirect(location), HERE)).toBe(false);
		}
	);

	it('is no refusal', () => {
		expect(isSignedOut({ type: 'failure', status: 422 }, HERE)).toBe(false);
	});
});
