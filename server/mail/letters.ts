import type { Role } from '#contract/people.ts';

/** A plain-text e-mail whose one link opens something for whoever holds it. */
export interface Letter {
  subject: string;
  link: string;
  /** the text around a link, so that it can be written without it too */
  text(link: string): string;
}

const article = (role: Role) => (role === 'admin' ? 'an' : 'a');

export interface InviteLetter {
  teamName: string;
  invitedBy: string;
  role: Role;
  link: string;
  days: number;
}

export const inviteLetter = ({ teamName, invitedBy, role, link, days }: InviteLetter): Letter => ({
  subject: `Join ${teamName} on Foothold`,
  link,
  text: (shown) => `Hello,

${invitedBy} invites you to join the team "${teamName}" on Foothold as ${article(role)} ${role}.

Open this link to join:
${shown}

It works once, for ${days} days. If you did not expect this, you need not do anything.

Foothold helps to plan where the recovery of coastal ground starts.
`,
});

export interface ResetLetter {
  name: string;
  link: string;
  minutes: number;
}

export const resetLetter = ({ name, link, minutes }: ResetLetter): Letter => ({
  subject: 'Set a new password for Foothold',
  link,
  text: (shown) => `Hello ${name},

somebody, hopefully you, asked for a new password for your account on Foothold.

Open this link to set one:
${shown}

It works once, for ${minutes} minutes, and ends all your sessions. If it was not you, you need not do anything: your
password stays as it is.
`,
});
