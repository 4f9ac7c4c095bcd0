import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { StaffRole } from '$lib/schemas/people';
import { id, moment, optionalMoment, reference, text } from './base';

/** Somebody who was asked to join a workshop. The link that the letter brought is kept as its hash alone. */
export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
	declare id: CreationOptional<number>;
	declare workshopId: number;
	declare name: string;
	declare email: string;
	declare role: StaffRole;
	declare tokenHash: string;
	declare expiresAt: Date;
	declare acceptedAt: CreationOptional<Date | null>;
	declare withdrawnAt: CreationOptional<Date | null>;
	declare invitedBy: number;
	declare createdAt: CreationOptional<Date>;
	declare updatedAt: CreationOptional<Date>;
}

export function initInvitation(sequelize: Sequelize): void {
	Invitation.init(
		{
			id: id,
			workshopId: reference,
			name: text,
			email: text,
			role: text,
			tokenHash: { type: DataTypes.CHAR(64), allowNull: false },
			expiresAt: moment,
			acceptedAt: optionalMoment,
			withdrawnAt: optionalMoment,
			invitedBy: reference,
			createdAt: moment,
			updatedAt: moment
		},
		{ sequelize, tableName: 'invitations', timestamps: true, modelName: 'Invitation' }
	);
}
