import { composeMail, type MailContent } from './layout.ts';

interface Person {
  readonly name: string;
  readonly organisationName: string;
}

export function invitationMail(to: Person, invitedBy: string, url: string): MailContent {
  return composeMail({
    subject: 'Your access to Trammel',
    to: to.name,
    paragraphs: [
      `${invitedBy} has set up access for you at ${to.organisationName}.`,
      'Follow the link and choose a password. The link works once, for seven days.',
    ],
    link: { label: 'Choose a password', url },
  });
}

export function supplierInvitationMail(to: Person, customerName: string, url: string): MailContent {
  return composeMail({
    subject: `${customerName} asks you to approve parts with them`,
    to: to.name,
    paragraphs: [
      `${customerName} wants to ask ${to.organisationName} for part approvals here: drawing, measurements, documents and sign-off in one place.`,
      'Follow the link and choose a password. The link works once, for seven days. You will be able to invite your colleagues.',
    ],
    link: { label: 'Choose a password', url },
  });
}

export function passwordResetMail(to: Person, url: string): MailContent {
  return composeMail({
    subject: 'Set a new password',
    to: to.name,
    paragraphs: [
      `Someone asked for a new password for your account at ${to.organisationName}.`,
      'If it was you, follow the link within an hour. If not, nothing has changed and nothing needs to be done.',
    ],
    link: { label: 'Set a new password', url },
  });
}

export function passwordChangedMail(to: Person): MailContent {
  return composeMail({
    subject: 'Your password was changed',
    to: to.name,
    paragraphs: [
      `The password of your account at ${to.organisationName} was changed and all its sessions were ended.`,
      'If this was not you, set a new password from the sign-in page and tell your administrator.',
    ],
  });
}
