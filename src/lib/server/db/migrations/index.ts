import { migration as m001 } from './001-workshops';
import { migration as m002 } from './002-customers';
import { migration as m003 } from './003-people';
import { migration as m004 } from './004-sessions';
import { migration as m005 } from './005-sign-in-links';
import { migration as m006 } from './006-rate-limits';
import { migration as m007 } from './007-vehicles';
import { migration as m008 } from './008-battery-records';
import { migration as m009 } from './009-places';
import { migration as m010 } from './010-jobs';
import { migration as m011 } from './011-mounts';
import { migration as m012 } from './012-day-plans';
import { migration as m013 } from './013-coefficient-books';
import { migration as m014 } from './014-coefficients';
import { migration as m015 } from './015-assessments';
import { migration as m016 } from './016-recommendations';
import { migration as m017 } from './017-sheets';
import { migration as m018 } from './018-acknowledgements';
import { migration as m019 } from './019-outgoing-mails';
import { migration as m020 } from './020-audit-entries';
import { migration as m021 } from './021-audit-heads';
import { migration as m022 } from './022-idempotency-keys';
import { migration as m023 } from './023-assessments-no-update';
import { migration as m024 } from './024-assessments-no-delete';
import { migration as m025 } from './025-audit-entries-no-update';
import { migration as m026 } from './026-audit-entries-no-delete';
import { migration as m027 } from './027-acknowledgements-no-update';
import { migration as m028 } from './028-acknowledgements-no-delete';
import { migration as m029 } from './029-recommendations-no-update';
import { migration as m030 } from './030-recommendations-no-delete';
import { migration as m031 } from './031-places-months';
import { migration as m032 } from './032-places-weather-file';
import { migration as m033 } from './033-jobs-days-on-road';
import { migration as m040 } from './040-assessment-outlooks';
import { migration as m041 } from './041-assessment-outlooks-no-update';
import { migration as m042 } from './042-assessment-outlooks-no-delete';
import { migration as m043 } from './043-remedy-lists';
import { migration as m044 } from './044-mounts-cable';
import { migration as m050 } from './050-batteries-without-bms';
import { migration as m051 } from './051-assessments-chemistry';
import { migration as m052 } from './052-jobs-chemistry';
import { migration as m060 } from './060-pre-drill-checks';
import { migration as m061 } from './061-recommendations-pre-drill';
import { migration as m062 } from './062-installations';
import { migration as m063 } from './063-follow-ups';
import { migration as m064 } from './064-field-notes';
import { migration as m065 } from './065-field-notes-no-update';
import { migration as m066 } from './066-field-notes-no-delete';
import { migration as m070 } from './070-stored-files';
import { migration as m080 } from './080-places-class';
import { migration as m081 } from './081-own-zones';
import { migration as m082 } from './082-review-rows';
import { migration as m083 } from './083-review-months';
import { migration as m084 } from './084-review-dark-days';
import { migration as m090 } from './090-invitations';
import { migration as m091 } from './091-people-seen';
import { migration as m092 } from './092-second-factors';
import { migration as m093 } from './093-recovery-codes';
import { migration as m094 } from './094-sign-in-steps';
import { migration as m095 } from './095-workshops-shop';
import { migration as m096 } from './096-workshop-logos';
import { migration as m097 } from './097-caution-texts';
import { migration as m098 } from './098-recommendations-cautions';
import { migration as m099 } from './099-audit-checks';
import { migration as m100 } from './100-erasures';
import { migration as m101 } from './101-customer-messages';
import { migration as m102 } from './102-customer-messages-no-update';
import { migration as m103 } from './103-customer-messages-no-delete';
import { migration as m104 } from './104-outgoing-mails-log';
import { migration as m105 } from './105-customers-reminders-stopped';
import { migration as m106 } from './106-acknowledgements-erasure';
import { migration as m107 } from './107-recommendations-erasure';
import { migration as m108 } from './108-assessments-erasure';
import { migration as m109 } from './109-field-notes-erasure';
import { migration as m109Then } from './109-then-audit-entries-erasure';
import { migration as m110 } from './110-recommendations-cautions-stay';
import { migration as m111 } from './111-customers-by-email';
import { migration as m112 } from './112-coefficient-books-hands';
import { migration as m113 } from './113-coefficients-origin';
import { migration as m114 } from './114-coefficients-published';
import { migration as m115 } from './115-coefficients-kept';
import { migration as m116 } from './116-coefficients-stay';
import { migration as m117 } from './117-coefficient-books-ways';
import { migration as m118 } from './118-coefficient-books-scope';
import { migration as m119 } from './119-coefficient-books-scope-stays';
import { migration as m120 } from './120-reruns';
import { migration as m121 } from './121-rerun-items';
import { migration as m130 } from './130-traces';
import { migration as m131 } from './131-trace-loggers';
import { migration as m132 } from './132-fits';
import { migration as m133 } from './133-coefficients-fit';
import { migration as m134 } from './134-coefficient-books-hands-in';
import { migration as m140 } from './140-review-rows-fitted-under';
import { migration as m145 } from './145-outgoing-mails-erasure';
import { migration as m146 } from './146-sessions-end-reason';
import { migration as m150 } from './150-field-note-strikes';
import { migration as m151 } from './151-field-note-strikes-no-update';
import { migration as m152 } from './152-field-note-strikes-no-delete';
import { migration as m160 } from './160-prediction-checks';
import { migration as m161 } from './161-prediction-checks-traces';
import { migration as m162 } from './162-outgoing-mails-handed-over';
import { migration as m170 } from './170-traces-to-hold';
import { migration as m171 } from './171-traces-by-file';
import { migration as m185 } from './185-installations-recommendation';
import { migration as m186 } from './186-installations-recommendation-known';
import { migration as m187 } from './187-field-note-findings';
import { migration as m188 } from './188-field-note-findings-no-update';
import { migration as m189 } from './189-field-note-findings-no-delete';
import { migration as m190 } from './190-recommendations-against-maker';
import { migration as m191 } from './191-recommendations-reasoned';
import { migration as m192 } from './192-recommendations-made-out-to';
import { migration as m193 } from './193-recommendations-against-stays';
import { migration as m194 } from './194-erasures-withdrawn';
import { migration as m195 } from './195-recommendations-number';
import { migration as m196 } from './196-recommendations-number-once';
import { migration as m197 } from './197-recommendations-numbered';
import { migration as m198 } from './198-recommendations-number-kept';
import { migration as m199 } from './199-recommendations-number-stays';
import { migration as m215 } from './215-pre-drill-signed-for';
import type { Migration } from '../migrate';

/** Every migration, in the order in which they run; each is one DDL step that may run again. */
export const migrations: Migration[] = [
	m001,
	m002,
	m003,
	m004,
	m005,
	m006,
	m007,
	m008,
	m009,
	m010,
	m011,
	m012,
	m013,
	m014,
	m015,
	m016,
	m017,
	m018,
	m019,
	m020,
	m021,
	m022,
	m023,
	m024,
	m025,
	m026,
	m027,
	m028,
	m029,
	m030,
	m031,
	m032,
	m033,
	m040,
	m041,
	m042,
	m043,
	m044,
	m050,
	m051,
	m052,
	m060,
	m061,
	m062,
	m063,
	m064,
	m065,
	m066,
	m070,
	m080,
	m081,
	m082,
	m083,
	m084,
	m090,
	m091,
	m092,
	m093,
	m094,
	m095,
	m096,
	m097,
	m098,
	m099,
	m100,
	m101,
	m102,
	m103,
	m104,
	m105,
	m106,
	m107,
	m108,
	m109,
	m109Then,
	m110,
	m111,
	m112,
	m113,
	m114,
	m115,
	m116,
	m117,
	m118,
	m119,
	m120,
	m121,
	m130,
	m131,
	m132,
	m133,
	m134,
	m140,
	m145,
	m146,
	m150,
	m151,
	m152,
	m160,
	m161,
	m162,
	m170,
	m171,
	m185,
	m186,
	m187,
	m188,
	m189,
	m190,
	m191,
	m192,
	m193,
	m194,
	m195,
	m196,
	m197,
	m198,
	m199,
	m215
];
