import { describe, expect, it } from 'vitest';
import { useTestDatabase } from '../../../../tests/support/services';
import { notFound } from '../errors';
import { readByLink, writeByLink } from './by-link';

useTestDatabase();

let used = 0;
const from = () => {
	const address = `192.0.2.${++used}`;
	return { getClientAddress: () => address };
};
const hit = () => Promise.resolve('the page');
const miss = () => Promise.reject(notFound('page'));
const times = async (count: number, work: () => Promise<unknown>) => {
	const codes = new Set<unknown>();
	for (let time = 0; time < count; time++)
		codes.add(
			await work().then(
				() => 'done',
				(error: { code?: string }) => error.code
			)
		);
	return [...codes];
};

describe('what a link alone opens', () => {
	it('opens as often as its reader likes', async () => {
		const reader = from();
		expect(await times(150, () => readByLink(reader, hit))).toEqual(['done']);
	});

	it('is shut to an address that has guessed a hundred times, even for a link that exists', async () => {
		const guesser = from();
		expect(await times(100, () => readByLink(guesser, miss))).toEqual(['not_found']);
		await expect(readByLink(guesser, hit)).rejects.toMatchObject({ code: 'too_many_requests' });
		expect(await readByLink(from(), hit)).toBe('the page');
	});

	it('takes sixty answers from one address in a quarter of an hour', async () => {
		const sender = from();
		expect(await times(60, () => writeByLink(sender, hit))).toEqual(['done']);
		await expect(writeByLink(sender, hit)).rejects.toMatchObject({ code: 'too_many_requests' });
		expect(await readByLink(sender, hit)).toBe('the page');
	});
});
