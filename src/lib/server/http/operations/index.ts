import type { Operation } from '../operation';
import { auditOperations } from './audit';
import { batteryOperations } from './batteries';
import { customerOperations } from './customers';
import { accuracyOperations } from './accuracy';
import { assessmentOperations } from './assessments';
import { bookOperations } from './books';
import { rerunOperations } from './reruns';
import { dayPlanOperations } from './day-plans';
import { fileOperations } from './files';
import { erasureOperations } from './erasures';
import { fittingOperations } from './fittings';
import { fitOperations } from './fits';
import { jobOperations } from './jobs';
import { letterOperations } from './letters';
import { mountOperations } from './mounts';
import { peopleOperations } from './people';
import { ownZoneOperations } from './own-zones';
import { placeOperations } from './places';
import { preDrillOperations } from './pre-drill';
import { questionOperations } from './questions';
import { recommendationOperations } from './recommendations';
import { remedyOperations } from './remedies';
import { reviewOperations } from './review';
import { sheetOperations } from './sheets';
import { shopOperations } from './shop';
import { simulationOperations } from './simulations';
import { traceOperations } from './traces';
import { vehicleOperations } from './vehicles';

/** Everything that the API does. A route without an entry here, or an entry without a route, fails a test. */
export const OPERATIONS: readonly Operation[] = [
	jobOperations,
	customerOperations,
	vehicleOperations,
	batteryOperations,
	placeOperations,
	mountOperations,
	preDrillOperations,
	fittingOperations,
	fileOperations,
	dayPlanOperations,
	sheetOperations,
	questionOperations,
	letterOperations,
	erasureOperations,
	bookOperations,
	accuracyOperations,
	rerunOperations,
	traceOperations,
	fitOperations,
	assessmentOperations,
	recommendationOperations,
	remedyOperations,
	simulationOperations,
	peopleOperations,
	shopOperations,
	auditOperations,
	reviewOperations,
	ownZoneOperations
].flatMap((group) => Object.values(group) as unknown as Operation[]);
