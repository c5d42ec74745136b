import { letter, type Mail } from '../accounts/mails';
import { linkBase } from '../mail/linkBase';

const ifNotYou = (publicUrl: string) =>
  `If it was not you, someone knows your password: choose a new one at once: ${linkBase(publicUrl)}/reset`;

export function secondFactorOnMail(publicUrl: string): Mail {
  return {
    subject: 'Signing in asks for a code from now on',
    text: letter(
      'Your account at Ebbline was set to ask for a code of your authenticator app after the password. Keep the recovery codes where you find them without the app.',
      ifNotYou(publicUrl),
    ),
  };
}

export function secondFactorOffMail(publicUrl: string): Mail {
  return {
    subject: 'Signing in asks for no code any more',
    text: letter(
      'The code that your account at Ebbline asked for after the password was turned off. The password alone opens it now.',
      ifNotYou(publicUrl),
    ),
  };
}

export function freshRecoveryCodesMail(publicUrl: string): Mail {
  return {
    subject: 'You have fresh recovery codes',
    text: letter(
      'Fresh recovery codes were made for your account at Ebbline. The earlier ones are void.',
      ifNotYou(publicUrl),
    ),
  };
}

export function recoveryCodeUsedMail(publicUrl: string): Mail {
  return {
    subject: 'A recovery code was used',
    text: letter(
      'A recovery code of your account at Ebbline was used just now in place of a code of your authenticator app. It is void from now on.',
      ifNotYou(publicUrl),
    ),
  };
}

export function codesRefusedMail(publicUrl: string): Mail {
  return {
    subject: 'Several wrong codes for your account',
    text: letter(
      'The right password of your account at Ebbline was followed by several wrong codes. No code is taken for a quarter of an hour.',
      ifNotYou(publicUrl),
    ),
  };
}
