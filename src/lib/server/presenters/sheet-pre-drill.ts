import type { OpenItem, PreDrillSnapshot } from '$lib/schemas/pre-drill';

const sayFailed = ({ label, note }: OpenItem): string => `${label}: not in order yet. ${note}`.trim();

const joined = new Intl.ListFormat('en-GB', { type: 'conjunction' });

function sayUnanswered(items: readonly OpenItem[]): string[] {
	if (items.length === 0) return [];
	return [`Not looked at yet: ${joined.format(items.map(({ label }) => label.toLowerCase()))}.`];
}

/** What the check before drilling left open, for the customer: what is not in order, then what nobody has looked at. */
export function sayBeforeDrilling(check: PreDrillSnapshot | null): string[] {
	const open = check?.open ?? [];
	return [
		...open.filter(({ state }) => state === 'failed').map(sayFailed),
		...sayUnanswered(open.filter(({ state }) => state === 'unanswered'))
	];
}
