import type { InvitationRow, PersonRow, StaffRole } from '$lib/schemas/people';
import type { Invitation, Person } from '../db/models';

export const presentPerson = (
	{ id, name, email, role, active, lastSignedInAt, leftAt, updatedAt, version }: Person,
	more: { readerId: number; hasSecondFactor: boolean }
): PersonRow => ({
	...{ id, name, email, version },
	role: role as StaffRole,
	lastSignedInAt: lastSignedInAt?.toISOString() ?? null,
	leftAt: active ? null : (leftAt ?? updatedAt).toISOString(),
	hasSecondFactor: more.hasSecondFactor,
	isYou: id === more.readerId
});

export const presentInvitation = (
	{ id, name, email, role, expiresAt }: Invitation,
	invitedBy: string,
	now: Date
): InvitationRow => ({
	...{ id, name, email, role, invitedBy },
	expiresAt: expiresAt.toISOString(),
	isTooOld: expiresAt <= now
});
