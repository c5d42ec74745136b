import { linkBase } from '../mail/linkBase';
import { addressChangeHours } from './addressChange';
import { tokenHours } from './oneTimeTokens';

export interface Mail {
  subject: string;
  text: string;
}

const linkTo = (publicUrl: string, path: string, token: string) =>
  `${linkBase(publicUrl)}${path}?token=${encodeURIComponent(token)}`;

/** The form of a mail from us to a person. */
export const letter = (...paragraphs: string[]) => [...paragraphs, 'Ebbline'].join('\n\n') + '\n';

export function verifyMail(publicUrl: string, token: string): Mail {
  return {
    subject: 'Confirm your e-mail address',
    text: letter(
      'Someone, we hope you, opened an account at Ebbline with this address. To confirm that it is yours, open this link:',
      linkTo(publicUrl, '/verify', token),
      `The link can be used once, within ${tokenHours.verify} hours; a newer mail makes it void. If it was not you, do nothing: without the confirmation nobody can sign in.`,
    ),
  };
}

export function alreadyRegisteredMail(publicUrl: string): Mail {
  const base = linkBase(publicUrl);
  return {
    subject: 'You already have an account',
    text: letter(
      'Someone, we hope you, tried to open an account at Ebbline with this address. It already has one, and nothing about it was changed.',
      `Sign in: ${base}/sign-in\nIf you do not know the password any more: ${base}/reset`,
      'If it was not you, there is nothing to do.',
    ),
  };
}

export function resetMail(publicUrl: string, token: string): Mail {
  return {
    subject: 'Choose a new password',
    text: letter(
      'Someone, we hope you, asked for a new password for the account with this address. To choose one, open this link:',
      linkTo(publicUrl, '/reset', token),
      `The link can be used once, within ${tokenHours.reset} hour. If it was not you, do nothing: your password stays as it is.`,
    ),
  };
}

/** @param signedOut 'others' when the browser it was changed in stays signed in */
export function passwordChangedMail(publicUrl: string, signedOut: 'all' | 'others' = 'all'): Mail {
  const browsers = signedOut === 'all' ? 'every browser' : 'every other browser';
  return {
    subject: 'Your password was changed',
    text: letter(
      `The password of your account was changed just now, and ${browsers} that was signed in with it has been signed out.`,
      `If it was not you, choose a new one at once: ${linkBase(publicUrl)}/reset`,
    ),
  };
}

/** To the address an account is to move to. */
export function confirmAddressMail(publicUrl: string, token: string): Mail {
  return {
    subject: 'Confirm your new e-mail address',
    text: letter(
      'Someone, we hope you, wants to use this address for their account at Ebbline from now on. To confirm that it is yours, open this link:',
      linkTo(publicUrl, '/confirm-address', token),
      `The link can be used once, within ${addressChangeHours} hours. Until then the account keeps its address. If it was not you, do nothing.`,
    ),
  };
}

/** To the address an account is to move away from, before it does. */
export function addressChangeAskedMail(publicUrl: string): Mail {
  return {
    subject: 'Your account is to move to another address',
    text: letter(
      'Someone who knows your password, we hope you, asked to move your account at Ebbline to another e-mail address. It moves once the link mailed to that address has been opened.',
      `If it was not you, choose a new password now; that stops it: ${linkBase(publicUrl)}/reset`,
    ),
  };
}

/** To the address an account has moved away from. */
export function addressChangedMail(): Mail {
  return {
    subject: 'Your account has moved to another address',
    text: letter(
      'The e-mail address of your account at Ebbline was changed just now. Mails go to the new address, and this one opens the account no more.',
    ),
  };
}
