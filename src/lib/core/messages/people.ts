export const signInRefused = () =>
	"Email and password don't match. What you typed as email is kept.";

export const signInPaused = () =>
	'Too many attempts with this email or from this place. Wait a quarter of an hour and try again.';

export const emailTaken = (email: string) => `Somebody with the email ${email} is here already.`;

export const lastAdministrator = () =>
	'This is the last administrator. Give somebody else the role before you take it away here.';

export const noSuchPerson = (email: string) => `Nobody with the email ${email} is here.`;

export const personAdded = (name: string) => `${name} can sign in with the password you typed.`;

export const personChanged = (name: string) => `${name} is changed.`;

export const tokenRevoked = () => 'The token is revoked; nothing accepts it any longer.';
