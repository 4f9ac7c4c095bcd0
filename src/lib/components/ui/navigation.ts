import type { Role } from '$lib/schemas/people';

export interface NavEntry {
	label: string;
	href: string;
}

const ENTRIES: (NavEntry & { roles?: Role[]; demoOnly?: boolean })[] = [
	{ label: 'Jobs', href: '/jobs' },
	{ label: 'Batteries', href: '/batteries' },
	{ label: 'Places', href: '/places' },
	{ label: 'Remedies', href: '/remedies' },
	{ label: 'Books', href: '/books', roles: ['engineer', 'manager'] },
	{ label: 'Accuracy', href: '/accuracy', roles: ['engineer', 'manager'] },
	{ label: 'Traces', href: '/traces', roles: ['engineer', 'manager'] },
	{ label: 'Shop', href: '/shop', roles: ['manager'] },
	{ label: 'Review', href: '/review', roles: ['manager'] },
	{ label: 'Mailbox', href: '/mailbox', demoOnly: true }
];

/** The entries at the top of a page for someone of the workshop. */
export function listNavigation(role: Role, isDemo: boolean): NavEntry[] {
	return ENTRIES.filter(
		(entry) => (!entry.roles || entry.roles.includes(role)) && (isDemo || !entry.demoOnly)
	).map(({ label, href }) => ({ label, href }));
}

/** Whether a page stands under an entry: "/jobs/12" under "/jobs", but not under "/job". */
export function isUnder(path: string, href: string): boolean {
	return path === href || path.startsWith(`${href}/`);
}
