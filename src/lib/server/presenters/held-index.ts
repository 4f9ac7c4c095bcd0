import { formatDate, formatDateTime } from '$lib/format/dates';
import type { HeldData } from './held-data';

/** A file of the parcel, and what it is. */
export interface ParcelFile {
	path: string;
	about: string;
}

const sayEmpty = (text: string): string => (text === '' ? 'not known' : text);

const sayTimes = (count: number): string => (count === 1 ? 'once' : `${count} times`);

/** The first page of the parcel, for people: what is held, in words, and what each file is. */
export function writeHeldIndex(
	{ aboutYou, signIns, vehicles, jobs, letters, whatHappened }: HeldData,
	files: readonly ParcelFile[],
	{ workshopName, madeAt }: { workshopName: string; madeAt: Date }
): string {
	const lines = [
		`What ${workshopName} holds about you, on ${formatDateTime(madeAt)}`,
		'',
		`Name: ${aboutYou.name}`,
		`E-mail: ${sayEmpty(aboutYou.email)}`,
		`Telephone: ${sayEmpty(aboutYou.telephone)}`,
		`Reminders by e-mail: ${aboutYou.remindersStoppedAt ? 'stopped' : 'wanted'}`,
		...signIns.map(({ email, sessions }) => `Signs in as: ${email}, ${sayTimes(sessions.length)} on record`),
		'',
		'Vehicles',
		...vehicles.map(
			({ make, model, modelYear, registration }) =>
				`- ${make} ${model} ${modelYear}, registration ${sayEmpty(registration)}`
		),
		'',
		'Jobs',
		...jobs.map(
			({ number, estimates, pages, questions }) =>
				`- Job ${number}: estimates ${estimates.length}, pages ${pages.length}, questions ${questions.length}`
		),
		'',
		'What happened',
		...whatHappened.flatMap(({ vehicle, history }) =>
			history.map(({ at, title, words }) => `- ${vehicle}, ${formatDate(at)}, ${title}: ${words}`)
		),
		'',
		`Letters: ${letters.length}; they are listed in data.json. What a letter said is not kept once it is sent.`,
		'',
		'Files',
		...files.map(({ path, about }) => `- ${path}: ${about}`),
		'',
		'You can ask the shop to put right what is wrong here, or to delete it.'
	];
	return lines.join('\r\n') + '\r\n';
}
