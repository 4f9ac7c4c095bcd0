import type { OpenItem, PreDrillSnapshot } from '$lib/schemas/pre-drill';

/** So many are told with what is missing: the page is one sheet of paper. */
const MOST_NOTES = 3;

const joined = new Intl.ListFormat('en-GB', { type: 'conjunction' });

const sayFailed = ({ label, note }: OpenItem): string => `${label}: not in order yet. ${note}`.trim();

function sayTogether(what: string, items: readonly OpenItem[]): string[] {
	return items.length === 0
		? []
		: [`${what}: ${joined.format(items.map(({ label }) => label.toLowerCase()))}.`];
}

/** What the check before drilling left open, for the customer: what is not in order, then what nobody has looked at. */
export function sayBeforeDrilling(check: PreDrillSnapshot | null): string[] {
	const open = check?.open ?? [];
	const failed = open.filter(({ state }) => state === 'failed');
	return [
		...failed.slice(0, MOST_NOTES).map(sayFailed),
		...sayTogether('Not in order yet either', failed.slice(MOST_NOTES)),
		...sayTogether(
			'Not looked at yet',
			open.filter(({ state }) => state === 'unanswered')
		)
	];
}
