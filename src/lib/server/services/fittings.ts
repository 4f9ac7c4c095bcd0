import { literal, Op, type Transaction } from 'sequelize';
import {
	FOLLOW_UP_MONTHS,
	type FittedMount,
	type FittingChange,
	type FittingView,
	type FollowUpChange
} from '$lib/schemas/fitting';
import { formatDate } from '$lib/format/dates';
import type { SignedInPerson } from '$lib/schemas/people';
import { Assessment, FieldNote, FollowUp, Installation, Mount, Recommendation } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, changedMeanwhile, notFound } from '../errors';
import { allow } from '../policies';
import { listAgreed, presentFitting } from '../presenters/fittings';
import { recordBy } from './audit';
import { addMonths, today } from './days';
import { isUnstruck } from './field-standing';
import { findMismatches } from './fitting-mismatch';
import { findStandingMount } from './mounts';
import { findFittedUnder, listOfMount } from './recommendation-history';
import { saveVersioned } from './records';
import { refreshReview } from './review/keep-review';

/** A look so long before its date is more likely a slip of the thumb: the page asks. */
const EARLY_MONTHS = 1;

const NOTHING_AGREED = 'Nothing is agreed for this mount yet: recommend it first.';

/** The newest recommendation of the mount, with all of the mount's before it. */
async function findAgreed(mount: Mount): Promise<{ held: Recommendation; all: Recommendation[] }> {
	const all = await listOfMount(mount);
	const [held] = all;
	if (!held) throw new AppError('conflict', NOTHING_AGREED);
	return { held, all };
}

async function show(mount: Mount): Promise<FittingView> {
	const installation = await Installation.findOne({ where: { mountId: mount.id } });
	const followUps = installation
		? await FollowUp.findAll({ where: { installationId: installation.id }, order: [['dueOn', 'ASC']] })
		: [];
	const { held: newest, all } = await findAgreed(mount);
	const held = (installation && (await findFittedUnder(installation))) ?? newest;
	const assessment = await Assessment.findByPk(installation?.assessmentId ?? held.assessmentId);
	if (!assessment) throw notFound('assessment');
	const agreement = { assessment, held, newest, first: all.at(-1)! };
	const days = { now: today(), soon: addMonths(today(), EARLY_MONTHS) };
	return presentFitting(mount, agreement, installation, followUps, days);
}

/** What was agreed for a mount, what was fitted, and when it is to be looked at. */
export async function getFitting(person: SignedInPerson, mountId: number): Promise<FittingView> {
	allow(person, 'jobs.read');
	return show(await findStandingMount(person, mountId));
}

/** The mounts of a job in which a battery is fitted, and when each is to be looked at next. */
export async function listFitted(person: SignedInPerson, jobId: number): Promise<FittedMount[]> {
	const { workshopId } = allow(person, 'jobs.read');
	const installations = await Installation.findAll({ where: { jobId, workshopId } });
	const standing = { jobId, workshopId, removedAt: null };
	const mounts = await Mount.findAll({ where: standing, order: [['letter', 'ASC']] });
	const open = await FollowUp.findAll({
		where: { installationId: installations.map(({ id }) => id), doneOn: null },
		order: [['dueOn', 'ASC']]
	});
	const mismatches = await findMismatches(installations);
	return mounts.flatMap(({ id: mountId, letter }) => {
		const installation = installations.find((each) => each.mountId === mountId);
		if (!installation) return [];
		const next = open.find(({ installationId }) => installationId === installation.id);
		const nextDueOn = next?.dueOn ?? null;
		const isOverdue = nextDueOn !== null && nextDueOn < today();
		return [{ mountId, letter, nextDueOn, isOverdue, mismatch: mismatches.get(mountId) ?? null }];
	});
}

/** The dates by rule; those of looks that were not done move with the day of fitting. */
async function setFollowUps(
	{ id, workshopId, fittedOn }: Installation,
	transaction: Transaction
): Promise<void> {
	for (const afterMonths of FOLLOW_UP_MONTHS) {
		const dueOn = addMonths(fittedOn, afterMonths);
		const [followUp, isNew] = await FollowUp.findOrCreate({
			where: { installationId: id, afterMonths },
			defaults: { workshopId, installationId: id, afterMonths, dueOn },
			transaction
		});
		if (isNew || followUp.dueOn === dueOn) continue;
		// Another day is another reminder. What was looked at stays where it was, unless that is now before the fitting.
		if (followUp.doneOn === null) await followUp.update({ dueOn, remindedAt: null }, { transaction });
		else if (followUp.dueOn < fittedOn) await followUp.update({ dueOn }, { transaction });
	}
}

/** Nothing can have been noted or looked at before it was fitted. */
async function refuseAfterwards({ id: installationId }: Installation, fittedOn: string): Promise<void> {
	const where = { installationId };
	const firstNote = await FieldNote.findOne({
		where: { ...where, [Op.and]: literal(isUnstruck('FieldNote')) },
		order: [['notedOn', 'ASC']]
	});
	const looks = await FollowUp.findAll({ where });
	const refuse = (what: string): never => {
		const message = `Fitted on must not be after ${what}.`;
		throw new AppError('invalid_input', message, [{ path: 'fittedOn', message }]);
	};
	if (firstNote && firstNote.notedOn < fittedOn) {
		refuse(`the first field note of it, ${formatDate(firstNote.notedOn)}`);
	}
	const [firstLook] = looks.flatMap(({ doneOn }) => doneOn ?? []).sort();
	if (firstLook && firstLook < fittedOn) refuse(`the first look at it, ${formatDate(firstLook)}`);
}

/** Keeps what was fitted against what was agreed, and sets the dates at which it is to be looked at. */
export async function saveFitting(
	person: SignedInPerson,
	mountId: number,
	change: FittingChange
): Promise<FittingView> {
	allow(person, 'mounts.write');
	const { version, ...fitted } = change;
	return inTransaction(async (transaction) => {
		const mount = await findStandingMount(person, mountId);
		let installation = await Installation.findOne({ where: { mountId }, lock: true, transaction });
		if (installation) {
			if (version === null) throw changedMeanwhile('fitting');
			if (fitted.fittedOn !== installation.fittedOn) await refuseAfterwards(installation, fitted.fittedOn);
			await saveVersioned(installation, 'fitting', version, fitted, transaction);
		} else {
			const { held } = await findAgreed(mount);
			const agreed = (await Assessment.findByPk(held.assessmentId))!;
			const { workshopId, jobId } = mount;
			const under = { assessmentId: agreed.id, recommendationId: held.id };
			const made = { workshopId, jobId, mountId, ...under, createdBy: person.id };
			installation = await Installation.create(
				{ ...made, ...fitted, agreed: listAgreed(agreed) },
				{ transaction }
			);
		}
		await setFollowUps(installation, transaction);
		await refreshReview('installation', installation.id, transaction);
		await recordBy(person, 'mount.fitted', { type: 'mount', id: mountId }, transaction, { ...fitted });
		return show(mount);
	});
}

/** Somebody has looked at the battery, or after all nobody has; to say the same again changes nothing. */
export async function finishFollowUp(
	person: SignedInPerson,
	followUpId: number,
	{ isDone, version }: FollowUpChange
): Promise<FittingView> {
	allow(person, 'mounts.write');
	return inTransaction(async (transaction) => {
		const where = { id: followUpId, workshopId: person.workshopId };
		const followUp = await FollowUp.findOne({ where, transaction });
		if (!followUp) throw notFound('follow-up');
		const installation = await Installation.findByPk(followUp.installationId, { transaction });
		const mount = await findStandingMount(person, installation!.mountId);
		if (isDone === ((followUp.doneOn ?? null) !== null)) return show(mount);
		// Where the day began earlier than ours, it was fitted on a day that has not come here.
		const doneOn = [today(), installation!.fittedOn].sort().at(-1)!;
		const done = isDone ? { doneOn, doneBy: person.name } : { doneOn: null, doneBy: null };
		await saveVersioned(followUp, 'follow-up', version, done, transaction);
		await refreshReview('installation', followUp.installationId, transaction);
		const subject = { type: 'mount', id: mount.id };
		await recordBy(person, 'mount.follow-up', subject, transaction, {
			afterMonths: followUp.afterMonths,
			...done
		});
		return show(mount);
	});
}
