import { describe, expect, it } from 'vitest';
import type { AuditEntry } from '../db/models';
import { actionsSaying, DID, presentAuditEntry, sayAction, type AuditNames } from './audit';

/** Past tenses that do not end in -ed; what is none of these and does not, does not read on from a name. */
const IRREGULAR = ['began', 'brought', 'chose', 'drew', 'gave', 'had', 'held', 'kept', 'let', 'made', 'put'];
const MORE_IRREGULAR = ['read', 'reset', 'said', 'sent', 'set', 'struck', 'took', 'told', 'withdrew'];
const PAST = new RegExp(`^(?:\\w+ed|${[...IRREGULAR, ...MORE_IRREGULAR].join('|')})\\b`);

const NAMES: AuditNames = {
	person: new Map([
		[5, 'Marit Oakshott'],
		[6, 'Odile Vantongeren']
	]),
	customer: new Map([[2, 'Odile Vantongeren']]),
	staff: new Set([5]),
	zones: new Set([8]),
	numberOf: (_, id) => id
};

const show = (action: string, subjectType: string, subjectId: number) =>
	presentAuditEntry(
		{
			...{ sequence: 1, at: new Date(0), personId: 5, detail: {} },
			action,
			subjectType,
			subjectId
		} as AuditEntry,
		NAMES
	);

describe('the words of the trail', () => {
	it.each(Object.entries(DID))('%s reads on from a name: "%s"', (action, words) => {
		expect(words).toMatch(PAST);
		expect(words).not.toMatch(/[.:]$/);
		expect(sayAction(action)).toBe(words);
		expect(actionsSaying(words)).toContain(action);
	});

	it('reads an action of an earlier edition out by its own words', () => {
		expect(sayAction('kettle.boiled-over')).toBe('kettle boiled over');
	});
});

describe('the page of a subject', () => {
	it.each([
		['person', 5, '/people/5'],
		['person', 6, null],
		['customer', 2, null],
		['own-zone', 8, '/review/zones/8'],
		['own-zone', 9, null],
		['job', 3, '/jobs/3']
	])('of %s %i is %s', (type, id, href) => {
		expect(show('job.created', type, id).href).toBe(href);
	});

	it('is not needed for a name', () => {
		expect(show('customer.admitted', 'person', 6)).toMatchObject({
			who: 'Marit Oakshott',
			subjectName: 'Odile Vantongeren'
		});
	});
});
