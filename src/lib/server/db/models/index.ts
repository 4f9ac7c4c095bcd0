import type { Sequelize } from 'sequelize';
import { Workshop, initWorkshop } from './workshop';
import { WorkshopLogo, initWorkshopLogo } from './workshop-logo';
import { CautionText, initCautionText } from './caution-text';
import { Customer, initCustomer } from './customer';
import { Person, initPerson } from './person';
import { Invitation, initInvitation } from './invitation';
import { Session, initSession } from './session';
import { SignInLink, initSignInLink } from './sign-in-link';
import { SignInStep, initSignInStep } from './sign-in-step';
import { SecondFactor, initSecondFactor } from './second-factor';
import { RecoveryCode, initRecoveryCode } from './recovery-code';
import { Vehicle, initVehicle } from './vehicle';
import { BatteryRecord, initBatteryRecord } from './battery-record';
import { Place, initPlace } from './place';
import { Job, initJob } from './job';
import { Mount, initMount } from './mount';
import { DayPlan, initDayPlan } from './day-plan';
import { CoefficientBook, initCoefficientBook } from './coefficient-book';
import { Coefficient, initCoefficient } from './coefficient';
import { Assessment, initAssessment } from './assessment';
import { AssessmentOutlook, initAssessmentOutlook } from './assessment-outlook';
import { Rerun, initRerun } from './rerun';
import { RerunItem, initRerunItem } from './rerun-item';
import { RemedyList, initRemedyList } from './remedy-list';
import { PreDrillCheck, initPreDrillCheck } from './pre-drill-check';
import { Recommendation, initRecommendation } from './recommendation';
import { Sheet, initSheet } from './sheet';
import { Acknowledgement, initAcknowledgement } from './acknowledgement';
import { Installation, initInstallation } from './installation';
import { FollowUp, initFollowUp } from './follow-up';
import { FieldNote, initFieldNote } from './field-note';
import { FieldNoteFinding, initFieldNoteFinding } from './field-note-finding';
import { FieldNoteStrike, initFieldNoteStrike } from './field-note-strike';
import { CustomerMessage, initCustomerMessage } from './customer-message';
import { StoredFile, initStoredFile } from './stored-file';
import { Trace, initTrace } from './trace';
import { TraceLogger, initTraceLogger } from './trace-logger';
import { Fit, initFit } from './fit';
import { Erasure, initErasure } from './erasure';
import { OwnZone, initOwnZone } from './own-zone';
import { OutgoingMail, initOutgoingMail } from './outgoing-mail';
import { AuditCheck, initAuditCheck } from './audit-check';
import { AuditEntry, initAuditEntry } from './audit-entry';

export {
	Workshop,
	WorkshopLogo,
	CautionText,
	Customer,
	Person,
	Invitation,
	Session,
	SignInLink,
	SignInStep,
	SecondFactor,
	RecoveryCode,
	Vehicle,
	BatteryRecord,
	Place,
	Job,
	Mount,
	DayPlan,
	CoefficientBook,
	Coefficient,
	Assessment,
	AssessmentOutlook,
	Rerun,
	RerunItem,
	RemedyList,
	PreDrillCheck,
	Recommendation,
	Sheet,
	Acknowledgement,
	Installation,
	FollowUp,
	FieldNote,
	FieldNoteFinding,
	FieldNoteStrike,
	CustomerMessage,
	StoredFile,
	Trace,
	TraceLogger,
	Fit,
	Erasure,
	OwnZone,
	OutgoingMail,
	AuditCheck,
	AuditEntry
};

const initialisers = [
	initWorkshop,
	initWorkshopLogo,
	initCautionText,
	initCustomer,
	initPerson,
	initInvitation,
	initSession,
	initSignInLink,
	initSignInStep,
	initSecondFactor,
	initRecoveryCode,
	initVehicle,
	initBatteryRecord,
	initPlace,
	initJob,
	initMount,
	initDayPlan,
	initCoefficientBook,
	initCoefficient,
	initAssessment,
	initAssessmentOutlook,
	initRerun,
	initRerunItem,
	initRemedyList,
	initPreDrillCheck,
	initRecommendation,
	initSheet,
	initAcknowledgement,
	initInstallation,
	initFollowUp,
	initFieldNote,
	initFieldNoteFinding,
	initFieldNoteStrike,
	initCustomerMessage,
	initStoredFile,
	initTrace,
	initTraceLogger,
	initFit,
	initErasure,
	initOwnZone,
	initOutgoingMail,
	initAuditCheck,
	initAuditEntry
];

/** Ties every model to the connection, and the models to each other. */
export function initModels(sequelize: Sequelize): void {
	// The library writes each column's name into the object that describes it, and ours are shared: give it copies.
	sequelize.addHook('beforeDefine', 'own-columns', (attributes) => {
		const columns = attributes as Record<string, object>;
		for (const [name, column] of Object.entries(columns)) columns[name] = { ...column };
	});
	for (const init of initialisers) init(sequelize);
	Vehicle.belongsTo(Customer, { as: 'customer', foreignKey: 'customerId' });
	Job.belongsTo(Customer, { as: 'customer', foreignKey: 'customerId' });
	Job.belongsTo(Vehicle, { as: 'vehicle', foreignKey: 'vehicleId' });
	Job.belongsTo(BatteryRecord, { as: 'batteryRecord', foreignKey: 'batteryRecordId' });
	Job.belongsTo(Place, { as: 'place', foreignKey: 'placeId' });
	Sheet.hasOne(Acknowledgement, { as: 'acknowledgement', foreignKey: 'sheetId' });
	Sheet.belongsTo(Job, { as: 'job', foreignKey: 'jobId' });
	Sheet.belongsTo(Recommendation, { as: 'recommendation', foreignKey: 'recommendationId' });
}
