import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { SessionEnd } from '$lib/schemas/people';
import { moment, optionalMoment, optionalText, reference } from './base';

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
	declare id: string;
	declare personId: number;
	declare createdAt: Date;
	declare lastSeenAt: Date;
	declare revokedAt: CreationOptional<Date | null>;
	/** Why somebody else ended it. */
	declare endReason: CreationOptional<SessionEnd | null>;
}

export function initSession(sequelize: Sequelize): void {
	Session.init(
		{
			id: { type: DataTypes.CHAR(64), primaryKey: true },
			personId: reference,
			createdAt: moment,
			lastSeenAt: moment,
			revokedAt: optionalMoment,
			endReason: optionalText
		},
		{ sequelize, tableName: 'sessions', timestamps: false, modelName: 'Session' }
	);
}
