import type { BookScope } from '$lib/schemas/books';
import demoBooks from '../../../../../seeds/demo-books.json';
import { changeCoefficient, draftBook, moveBook } from '../book-changes';
import { listBooks } from '../books';
import type { Crew } from './seed-people';

type DemoBook = (typeof demoBooks)[number];

async function seedBook({ manager, staff }: Crew, { values, ...book }: DemoBook): Promise<void> {
	const maker = staff.find(({ role }) => role === 'engineer');
	const [from] = await listBooks(manager);
	if (!maker || !from) throw new Error(`Nobody can make the demo book "${book.name}", or from none.`);
	const { engineLayout, positionKind } = book as BookScope;
	const { name, note } = book;
	const draft = await draftBook(maker, { fromBookId: from.id, name, note, engineLayout, positionKind });
	let version = draft.version;
	for (const { group, key, value, source } of values) {
		const change = { value, source, origin: 'judgement', version } as const;
		({ version } = await changeCoefficient(maker, draft.id, { group, key }, change));
	}
	({ version } = await moveBook(maker, draft.id, { to: 'on-trial', version }));
	await moveBook(manager, draft.id, { to: 'in-force', version });
}

/** Books for some mounts, put in force by a second person as in life; what they concern is assessed again. */
export async function seedBooks(crew: Crew): Promise<void> {
	for (const book of demoBooks.filter(({ workshop }) => workshop === crew.key)) await seedBook(crew, book);
}
