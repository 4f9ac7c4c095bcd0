import { endpoint } from '$lib/server/http/endpoint';
import { shopOperations } from '$lib/server/http/operations/shop';
import { getCautionText, saveCautionText } from '$lib/server/services/caution-texts';

export const GET = endpoint(shopOperations.getCautions, ({ person }) => getCautionText(person));

export const PUT = endpoint(shopOperations.saveCautions, ({ person, body }) => saveCautionText(person, body));
