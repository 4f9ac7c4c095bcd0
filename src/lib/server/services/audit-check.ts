import type { AuditCheckView } from '$lib/schemas/audit';
import type { SignedInPerson } from '$lib/schemas/people';
import { AuditCheck, Workshop } from '../db/models';
import { allow } from '../policies';
import { walkTrail, type Walk } from './audit-walk';

/** A trail that is whole by itself and not the one that was there: somebody has cut it or written it anew. */
function findRewritten({ hashAt, finding }: Walk, before: AuditCheck | null): string | null {
	if (finding || !before || before.entries === 0) return finding;
	return hashAt === before.headHash
		? null
		: `entry ${before.entries} is not the one that was there when the trail was last found whole`;
}

export interface TrailCheck extends AuditCheckView {
	workshopId: number;
	workshopName: string;
	headHash: string;
}

/** Looks one workshop's trail through and notes the outcome; what was last whole stays as the mark for the next time. */
async function checkTrail({ id: workshopId, name: workshopName }: Workshop): Promise<TrailCheck> {
	const before = await AuditCheck.findByPk(workshopId);
	const walk = await walkTrail(workshopId, before?.entries);
	const finding = findRewritten(walk, before);
	const checkedAt = new Date();
	const mark =
		finding === null
			? { entries: walk.entries, headHash: walk.headHash }
			: { entries: before?.entries ?? 0, headHash: before?.headHash ?? '' };
	await AuditCheck.upsert({ workshopId, checkedAt, finding, ...mark });
	const { entries, headHash } = walk;
	return { workshopId, workshopName, checkedAt: checkedAt.toISOString(), entries, headHash, finding };
}

/** Looks through the trails of all workshops, or of those that are named. */
export async function checkTrails(ids: readonly number[] = []): Promise<TrailCheck[]> {
	const workshops = await Workshop.findAll({
		...(ids.length > 0 ? { where: { id: [...ids] } } : {}),
		order: [['id', 'ASC']]
	});
	const checks: TrailCheck[] = [];
	for (const workshop of workshops) checks.push(await checkTrail(workshop));
	return checks;
}

const present = ({ checkedAt, entries, finding }: AuditCheckView): AuditCheckView => ({
	...{ checkedAt, entries, finding }
});

export async function checkOwnTrail(person: SignedInPerson): Promise<AuditCheckView> {
	const { workshopId } = allow(person, 'audit.read');
	const [check] = await checkTrails([workshopId]);
	return present(check!);
}

/** When the workshop's trail was last looked through, and what was found; null while nobody has. */
export async function lastCheck(person: SignedInPerson): Promise<AuditCheckView | null> {
	const { workshopId } = allow(person, 'audit.read');
	const check = await AuditCheck.findByPk(workshopId);
	if (!check) return null;
	const { checkedAt, entries, finding } = check;
	return present({ checkedAt: checkedAt.toISOString(), entries, finding: finding ?? null });
}
