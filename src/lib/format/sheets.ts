import type { SheetStatus } from '../schemas/sheets';
import { formatDateTime } from './dates';

/** Who sent a page when, and to whom. */
export const saySent = ({ sentBy, sentTo, createdAt }: SheetStatus): string =>
	`${sentBy} sent this page to ${sentTo} on ${formatDateTime(createdAt)}, while you had this open.`;
