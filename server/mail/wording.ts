import type { MailText } from './layout.ts';
import type { MailMessage } from './messages.ts';

const notYou = 'If this was not you, you need not do anything.';

/**
 * The words of every mail. Links carry their secret behind `#`: browsers keep that part to
 * themselves, so it reaches no log and no Referer. Subjects name no songs.
 */
export function wordMail(message: MailMessage, origin: string): MailText {
  switch (message.kind) {
    case 'confirm-account':
      return {
        subject: 'Confirm your address for Flightcase',
        heading: 'One more step',
        paragraphs: [
          'You asked for an account with Flightcase under this address.',
          'Choose a password and you are in. The link works once, within 24 hours.',
        ],
        action: {
          label: 'Confirm and choose a password',
          url: `${origin}/confirm#token=${message.secret}`,
        },
        aside: `${notYou} Without the link there will be no account.`,
      };
    case 'account-exists':
      return {
        subject: 'You already have an account with Flightcase',
        heading: 'You are already here',
        paragraphs: [
          'Somebody, probably you, asked for an account under this address. There is one already, so nothing was changed.',
          'Sign in as usual. If you have forgotten the password, the page lets you choose a new one.',
        ],
        action: { label: 'Sign in', url: `${origin}/sign-in` },
        aside: notYou,
      };
    case 'reset-password':
      return {
        subject: 'Choose a new password for Flightcase',
        heading: 'A new password',
        paragraphs: [
          'Somebody, probably you, asked for a new password for your account.',
          'The link works once, within one hour. Choosing a new password signs you out everywhere else.',
        ],
        action: {
          label: 'Choose a new password',
          url: `${origin}/reset-password#token=${message.secret}`,
        },
        aside: `${notYou} Your password stays as it is.`,
      };
    case 'no-account':
      return {
        subject: 'No Flightcase account under this address',
        heading: 'We do not know this address',
        paragraphs: [
          'Somebody, probably you, asked for a new password, but no account belongs to this address.',
          'Perhaps you signed up with another address. If not, you can make an account now.',
        ],
        action: { label: 'Make an account', url: `${origin}/register` },
        aside: notYou,
      };
    case 'password-changed':
      return {
        subject: 'Your Flightcase password was changed',
        heading: 'Your password is new',
        paragraphs: [
          'The password of your account was changed just now, and every other browser was signed out.',
        ],
        action: { label: 'This was not me', url: `${origin}/forgot-password` },
        aside: 'If this was you, all is well.',
      };
    case 'change-address':
      return {
        subject: 'Confirm your new address for Flightcase',
        heading: 'Your new address',
        paragraphs: [
          'You asked to use this address for your account from now on.',
          'The link works once, within 24 hours. Afterwards you sign in with this address.',
        ],
        action: {
          label: 'Use this address',
          url: `${origin}/confirm-address#token=${message.secret}`,
        },
        aside: `${notYou} Without the link nothing changes.`,
      };
    case 'address-in-use':
      return {
        subject: 'This address already has a Flightcase account',
        heading: 'This address is taken',
        paragraphs: [
          'Somebody, probably you, wanted to move another account to this address. An account of its own belongs to it already, so nothing was changed.',
        ],
        aside: notYou,
      };
    case 'address-changed':
      return {
        subject: 'Your Flightcase account has a new address',
        heading: 'Your address was changed',
        paragraphs: [
          'Your account now belongs to another address, which was confirmed just now. This one no longer signs you in.',
          'If this was not you, reply to this mail at once: somebody knew your password.',
        ],
        aside: 'If this was you, all is well.',
      };
    case 'invitation-to-studio':
      return {
        subject: `${message.invitedBy} invites you to work with ${message.studioName}`,
        heading: message.studioName,
        paragraphs: [
          `${message.invitedBy} invites you to ${message.studioName} as an assistant.`,
          'You will see the projects you are put on, and review what artists deliver there. The link works once, within 14 days.',
        ],
        action: {
          label: 'See the invitation',
          url: `${origin}/invitation#token=${message.secret}`,
        },
        aside: 'If you do not know who this is, you need not do anything.',
      };
    case 'invitation-to-project':
      return {
        subject: `${message.invitedBy} invites you to prepare files for ${message.studioName}`,
        heading: `${message.artistName}: ${message.projectTitle}`,
        paragraphs: [
          `${message.invitedBy} invites you as ${message.role === 'artist' ? 'the artist' : 'a bandmate'}. ${message.studioName} is going to mix it.`,
          'You will find what to send, check your files in your own browser before anything is uploaded, and send them once. The link works once, within 14 days.',
        ],
        action: {
          label: 'See the invitation',
          url: `${origin}/invitation#token=${message.secret}`,
        },
        aside: 'If you do not know who this is, you need not do anything.',
      };
  }
}
