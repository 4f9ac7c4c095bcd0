import type { FileView } from '$lib/schemas/files';
import type { SignedInPerson } from '$lib/schemas/people';
import type { PreDrillView } from '$lib/schemas/pre-drill';
import {
	fromPreDrillForm,
	preDrillFormSchema,
	preDrillSigningSchema,
	toPreDrillForm
} from '$lib/schemas/pre-drill-form';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { listMountFiles } from '$lib/server/services/files';
import { getJob } from '$lib/server/services/jobs';
import { getPreDrill, saveAndSignPreDrill, savePreDrill } from '$lib/server/services/pre-drill';
import { openMount } from '../open-mount';
import type { Actions, PageServerLoad } from './$types';

function answersOf({ questions }: PreDrillView) {
	return Object.fromEntries(
		questions.flatMap(({ key, answer, note }) => (answer ? [[key, { answer, note }] as const] : []))
	);
}

/** How many photos each question has. */
function countPhotos(files: readonly FileView[]): Record<string, number> {
	const counts: Record<string, number> = {};
	for (const { kind, questionKey } of files) {
		if (kind === 'photo' && questionKey !== null) counts[questionKey] = (counts[questionKey] ?? 0) + 1;
	}
	return counts;
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const check = await orPageError(getPreDrill(person, mount.id));
	const job = await orPageError(getJob(person, mount.jobId));
	const { version } = check;
	const files = await orPageError(listMountFiles(person, mount.id));
	const assessmentId = job.standings.find(({ mountId }) => mountId === mount.id)?.assessmentId ?? null;
	return {
		...{ mount, check, assessmentId },
		job: { id: job.id, number: job.number, chemistry: job.battery?.chemistry ?? '' },
		form: await loadForm(preDrillFormSchema, {
			...{ version, signerName: person.name },
			...toPreDrillForm(answersOf(check))
		}),
		photosOf: countPhotos(files),
		isSaved: event.url.searchParams.has('saved'),
		isSigned: event.url.searchParams.has('signed')
	};
};

type SentForm = Record<string, unknown>;

const toChange = (form: SentForm) => ({
	answers: fromPreDrillForm(form),
	version: form.version as number
});

/** The form as the answers stand by now. */
async function readNewest(person: SignedInPerson, mountId: number) {
	const check = await getPreDrill(person, mountId);
	return { version: check.version, ...toPreDrillForm(answersOf(check)) };
}

export const actions: Actions = {
	save: (event) => {
		const mountId = pageId(event.params.mountId);
		return saveEdited(event, {
			action: 'mounts.write',
			schema: preDrillFormSchema,
			save: async (person, form) => {
				await savePreDrill(person, mountId, toChange(form));
				const questionKey = event.url.searchParams.get('photo');
				return questionKey === null
					? `/mounts/${mountId}/pre-drill?saved`
					: `/mounts/${mountId}/photos?question=${encodeURIComponent(questionKey)}`;
			},
			newest: (person) => readNewest(person, mountId)
		});
	},
	// What is signed is what stands on the screen: the answers are kept with the name, or neither is.
	sign: (event) => {
		const mountId = pageId(event.params.mountId);
		return saveEdited(event, {
			action: 'mounts.write',
			schema: preDrillSigningSchema,
			save: async (person, form) => {
				await saveAndSignPreDrill(person, mountId, { ...toChange(form), name: String(form.signerName) });
				return `/mounts/${mountId}/pre-drill?signed`;
			},
			newest: (person) => readNewest(person, mountId)
		});
	}
};
