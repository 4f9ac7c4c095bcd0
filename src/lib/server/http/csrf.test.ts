import { describe, expect, it } from 'vitest';
import { isForged } from './csrf';

const ORIGIN = 'https://shop.example';

function ask(method: string, headers: Record<string, string>): Request {
	return new Request(`${ORIGIN}/jobs`, { method, headers });
}

describe('a request from another site', () => {
	it.each([
		['reads a page, which changes nothing', 'GET', { 'sec-fetch-site': 'cross-site' }, false],
		['posts a form', 'POST', { 'sec-fetch-site': 'cross-site' }, true],
		['posts from a sister site', 'POST', { 'sec-fetch-site': 'same-site' }, true],
		['deletes', 'DELETE', { 'sec-fetch-site': 'cross-site' }, true],
		['puts JSON from an old browser', 'PUT', { origin: 'https://elsewhere.example' }, true],
		['comes from a frame without an origin', 'POST', { origin: 'null' }, true],
		['is our own form', 'POST', { 'sec-fetch-site': 'same-origin' }, false],
		['is our own form from an old browser', 'POST', { origin: ORIGIN }, false],
		['is a program with neither header, which carries no stolen cookie', 'POST', {}, false],
		[
			'claims our origin but says where it is from',
			'POST',
			{ origin: ORIGIN, 'sec-fetch-site': 'cross-site' },
			true
		]
	])('%s', (_what, method, headers, forged) => {
		expect(isForged(ask(method, headers as Record<string, string>), ORIGIN)).toBe(forged);
	});
});
