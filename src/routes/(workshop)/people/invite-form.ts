/** The form of an invitation: the buttons on those that are out belong to it, so that they cost nothing typed in it. */
export const INVITE_FORM = 'invite-form';
