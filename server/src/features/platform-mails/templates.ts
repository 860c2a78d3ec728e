import { config } from '../../core/config';
import { mailedToken, type TokenPurpose } from '../../core/auth/mailed-token';
import { layOut, type Letter } from '../../core/mail/mail-layout';

/** What each mail of sign-in and the platform is told. Ids only where a link is made of them. */
export interface PlatformMailParams {
  confirm_sign_up: { name: string; shopName: string; signUpId: string; known: boolean };
  reset_password: { name: string; resetId: string };
  password_changed: { name: string };
  recovery_code_used: { name: string; left: number };
  recovery_codes_renewed: { name: string };
  one_time_codes_stopped: { name: string };
  invitation: {
    name: string;
    shopName: string;
    invitedBy: string;
    /** As in "asks you to join as a tech". */
    as: string;
    invitationId: string;
  };
  subscription_changed: { name: string; shopName: string; words: string };
}

export type PlatformMailTemplate = keyof PlatformMailParams;

type Written = Omit<Letter, 'title' | 'sender' | 'greeting'> & { subject: string };

const writers: {
  [T in PlatformMailTemplate]: (params: PlatformMailParams[T]) => Written;
} = {
  confirm_sign_up: ({ shopName, signUpId, known }) => ({
    subject: `Confirm your address to open ${shopName}`,
    pieces: [
      {
        words: known
          ? `Somebody, hopefully you, asked to open the shop ${shopName} with this address. You have ` +
            'an account here already: the link adds the shop to it, and your password stays as it is.'
          : `Somebody, hopefully you, asked to open the shop ${shopName} with this address. The link ` +
            'confirms the address and opens the shop on a trial plan.',
      },
      link('Confirm and open the shop', '/verify-email', 'sign_up', signUpId),
      { words: 'The link works for 24 hours. If it was not you, do nothing: no shop is opened.' },
    ],
    why: 'This mail was asked for on our sign-up page. We write no advertisements.',
  }),

  reset_password: ({ resetId }) => ({
    subject: 'Choose a new password',
    pieces: [
      { words: 'Somebody, hopefully you, asked to choose a new password for this address.' },
      link('Choose a new password', '/reset-password', 'reset_password', resetId),
      {
        words:
          'The link works for one hour, once. Choosing a new password signs you out everywhere. ' +
          'If it was not you, do nothing: your password stays as it is.',
      },
    ],
    why: 'This mail was asked for on our sign-in page.',
  }),

  password_changed: () => ({
    subject: 'Your password was changed',
    pieces: [
      { words: 'Your password was changed just now, and you were signed out on other devices.' },
      {
        words:
          'If it was you, there is nothing to do. If not, choose a new password at once: whoever ' +
          'changed it can sign in as you.',
      },
      { link: { label: 'Choose a new password', url: `${config().publicUrl}/forgot-password` } },
    ],
    why: 'We always write when a password is changed.',
  }),

  recovery_code_used: ({ left }) => ({
    subject: 'A recovery code was used',
    pieces: [
      {
        words:
          'One of your recovery codes was used just now in place of a one-time code, together with ' +
          `your password. ${left === 1 ? '1 is' : `${left} are`} left.`,
      },
      {
        words:
          'If it was you, make new ones before you run out. If not, choose a new password at once, ' +
          'then make new recovery codes: somebody knows your password and one of your codes.',
      },
      { link: { label: 'Choose a new password', url: `${config().publicUrl}/forgot-password` } },
      { link: { label: 'Your account', url: `${config().publicUrl}/account` } },
    ],
    why: 'We always write when a recovery code is used.',
  }),

  recovery_codes_renewed: () => ({
    subject: 'You have new recovery codes',
    pieces: [
      { words: 'New recovery codes were made for your account just now. Those before have ended.' },
      {
        words:
          'If it was you, there is nothing to do. If not, choose a new password at once, then make ' +
          'new recovery codes: whoever made these can sign in as you.',
      },
      { link: { label: 'Choose a new password', url: `${config().publicUrl}/forgot-password` } },
    ],
    why: 'We always write when recovery codes are made anew.',
  }),

  one_time_codes_stopped: () => ({
    subject: 'One-time codes are off',
    pieces: [
      {
        words:
          'Signing in to your account asks for no one-time code any longer, since just now. Your ' +
          'recovery codes have ended with them.',
      },
      {
        words:
          'If it was you, there is nothing to do. If not, choose a new password at once, then put ' +
          'one-time codes in force again: somebody had your account open.',
      },
      { link: { label: 'Choose a new password', url: `${config().publicUrl}/forgot-password` } },
      { link: { label: 'Your account', url: `${config().publicUrl}/account` } },
    ],
    why: 'We always write when one-time codes are switched off.',
  }),

  invitation: ({ shopName, invitedBy, as, invitationId }) => ({
    subject: `${shopName} invites you`,
    pieces: [
      { words: `${invitedBy} of ${shopName} asks you to join ${as}.` },
      {
        link: {
          label: 'See the invitation',
          url: `${config().publicUrl}/invitations/${mailedToken('invitation', invitationId)}`,
        },
      },
      {
        words:
          'The link works for 14 days, for you alone: please do not pass it on. ' +
          'If you do not know the shop, do nothing.',
      },
    ],
    why: `You get this mail because ${shopName} entered your address to invite you.`,
  }),

  subscription_changed: ({ shopName, words }) => ({
    subject: `The subscription of ${shopName}`,
    pieces: [
      { words },
      {
        link: { label: 'See the subscription', url: `${config().publicUrl}/shop/subscription` },
      },
      { words: 'Whatever happens, everything in the shop can be read and exported.' },
    ],
    why: `You get this mail as an owner of ${shopName}.`,
  }),
};

/** Both forms of a mail, and its subject. Links are made now, not when the mail was queued. */
export function writeMail<T extends PlatformMailTemplate>(
  template: T,
  params: PlatformMailParams[T] & { name: string },
): { subject: string; text: string; html: string } {
  const { subject, pieces, why } = writers[template](params);
  const letter = {
    title: subject,
    locale: 'en',
    greeting: `Good day, ${params.name}`,
    pieces,
    why,
    sender: ['Tumblewright', config().publicUrl],
  };
  return { subject, ...layOut(letter) };
}

/** The secret stands after the #, which browsers send to no server, so it is in no log. */
function link(label: string, path: string, purpose: TokenPurpose, id: string) {
  const url = `${config().publicUrl}${path}#token=${mailedToken(purpose, id)}`;
  return { link: { label, url } };
}
