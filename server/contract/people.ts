import { z } from 'zod';
import { endpoint, id, instant, text } from './endpoint.ts';

export const roles = ['modeller', 'manager', 'trainer', 'admin'] as const;
export const roleSchema = z.enum(roles);
export type Role = z.infer<typeof roleSchema>;

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email('Expected an e-mail address such as name@example.org'))
  .pipe(z.string().max(254));
/** Long enough to matter; bcrypt reads 72 bytes at the most. */
export const passwordSchema = z
  .string()
  .min(10, 'At least 10 characters')
  .refine((p) => new TextEncoder().encode(p).length <= 72, 'At most 72 bytes');

const personName = text(100);
const teamName = text(100);

export const membershipSchema = z.object({ teamId: id, teamName: z.string(), role: roleSchema });
export const sessionSchema = z.object({
  person: z.object({ id, name: z.string(), email: z.string() }).nullable(),
  memberships: z.array(membershipSchema),
  /** true while the invented demo accounts can sign in */
  demo: z.boolean(),
});
export type Session = z.infer<typeof sessionSchema>;

export const getHealth = endpoint({
  method: 'GET',
  path: '/api/health',
  summary: 'Answers when the product is ready',
  reply: z.object({ status: z.literal('ok'), version: z.string() }),
});

export const getSession = endpoint({
  method: 'GET',
  path: '/api/session',
  summary: 'Who is signed in',
  reply: sessionSchema,
});
export const signIn = endpoint({
  method: 'POST',
  path: '/api/session',
  summary: 'Sign in',
  body: z.strictObject({ email: emailSchema, password: z.string().min(1, 'Give your password').max(1000) }),
  reply: sessionSchema,
});
export const signOut = endpoint({ method: 'DELETE', path: '/api/session', summary: 'Sign out' });

export const listDemoAccounts = endpoint({
  method: 'GET',
  path: '/api/demo-accounts',
  summary: 'The invented accounts, while the demo is on',
  reply: z.object({
    accounts: z.array(z.object({ role: roleSchema, email: z.string(), password: z.string() })),
  }),
});

/** A one-time link: unguessable, stored hashed. */
export const linkToken = z.string().regex(/^[\w-]{40,64}$/, 'This link is not complete');
const tokenParams = z.object({ token: linkToken });

export const getSetup = endpoint({
  method: 'GET',
  path: '/api/setup/:token',
  summary: 'Whether the one-time set-up link still works',
  params: tokenParams,
  reply: z.object({ open: z.literal(true) }),
});
export const completeSetup = endpoint({
  method: 'POST',
  path: '/api/setup/:token',
  summary: 'Make the first team and its admin',
  params: tokenParams,
  body: z.strictObject({ teamName, name: personName, email: emailSchema, password: passwordSchema }),
  reply: sessionSchema,
});

export const getInvite = endpoint({
  method: 'GET',
  path: '/api/invites/:token',
  summary: 'What an invite is for',
  params: tokenParams,
  reply: z.object({ teamName: z.string(), email: z.string(), role: roleSchema, hasAccount: z.boolean() }),
});
export const acceptInvite = endpoint({
  method: 'POST',
  path: '/api/invites/:token',
  summary: 'Join a team',
  params: tokenParams,
  body: z.strictObject({
    /** for a new account */
    name: personName.optional(),
    /** a new account's password, or the present one of an account that exists */
    password: z.string().min(1, 'Give a password').max(1000),
  }),
  reply: sessionSchema,
});

export const requestPasswordReset = endpoint({
  method: 'POST',
  path: '/api/password-resets',
  summary: 'Ask for a reset link by e-mail; the answer is the same whether or not there is such an account',
  body: z.strictObject({ email: emailSchema }),
});
export const completePasswordReset = endpoint({
  method: 'POST',
  path: '/api/password-resets/:token',
  summary: 'Set a new password; ends all sessions and revokes all access tokens',
  params: tokenParams,
  body: z.strictObject({ password: passwordSchema }),
});

export const openSessionSchema = z.object({
  id: z.string(),
  current: z.boolean(),
  device: z.string(),
  startedAt: instant,
  seenAt: instant,
});
export const listMySessions = endpoint({
  method: 'GET',
  path: '/api/account/sessions',
  summary: 'Where I am signed in',
  reply: z.object({ sessions: z.array(openSessionSchema) }),
});
export const endMySession = endpoint({
  method: 'DELETE',
  path: '/api/account/sessions/:sessionId',
  summary: 'End one of my sessions',
  params: z.object({ sessionId: z.string().max(100) }),
});
export const changeMyName = endpoint({
  method: 'PATCH',
  path: '/api/account',
  summary: 'Change my name',
  body: z.strictObject({ name: personName }),
  reply: sessionSchema,
});
export const changeMyPassword = endpoint({
  method: 'POST',
  path: '/api/account/password',
  summary: 'Change my password; ends my other sessions',
  body: z.strictObject({
    current: z.string().min(1, 'Give your present password').max(1000),
    password: passwordSchema,
  }),
});

const teamParams = z.object({ teamId: id });
export const memberSchema = z.object({
  personId: id,
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  joinedAt: instant,
  openSessions: z.number().int(),
});
export type Member = z.infer<typeof memberSchema>;
export const inviteSchema = z.object({
  id,
  email: z.string(),
  role: roleSchema,
  sentAt: instant,
  expiresAt: instant,
  invitedBy: z.string(),
});
export const listMyTeams = endpoint({
  method: 'GET',
  path: '/api/teams',
  summary: 'The teams that I am in, with my role in each; by access token, those that it reaches',
  reply: z.object({ teams: z.array(membershipSchema) }),
});
export const createTeam = endpoint({
  method: 'POST',
  path: '/api/teams',
  summary: 'Found a further team, as its admin',
  body: z.strictObject({ name: teamName }),
  reply: sessionSchema,
});
export const listMembers = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/members',
  summary: 'The members of a team',
  params: teamParams,
  reply: z.object({ members: z.array(memberSchema) }),
});
const memberParams = z.object({ teamId: id, personId: id });
export const changeMemberRole = endpoint({
  method: 'PATCH',
  path: '/api/teams/:teamId/members/:personId',
  summary: 'Change a member’s role; a team keeps at least one admin',
  params: memberParams,
  body: z.strictObject({ role: roleSchema }),
  reply: memberSchema,
});
export const removeMember = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/members/:personId',
  summary: 'Take a member out of the team',
  params: memberParams,
});
export const endMemberSessions = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/members/:personId/sessions',
  summary: 'Sign a member out everywhere: ends their sessions and revokes their access tokens',
  params: memberParams,
});
export const listInvites = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/invites',
  summary: 'Invites that wait for an answer',
  params: teamParams,
  reply: z.object({ invites: z.array(inviteSchema) }),
});
export const sendInvite = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/invites',
  summary: 'Invite somebody by e-mail',
  params: teamParams,
  body: z.strictObject({ email: emailSchema, role: roleSchema }),
  reply: inviteSchema,
});
export const withdrawInvite = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/invites/:inviteId',
  summary: 'Withdraw an invite',
  params: z.object({ teamId: id, inviteId: id }),
});

export const outboxMessageSchema = z.object({
  id,
  to: z.string(),
  subject: z.string(),
  sentAt: instant,
  /** `outbox`: kept here because no mail server is set; `sent`: handed to the mail server; `failed`: it refused */
  status: z.enum(['outbox', 'sent', 'failed']),
  error: z.string().nullable(),
});
export const listOutbox = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/outbox',
  summary: 'E-mail that the team’s work has caused, newest first',
  params: teamParams,
  reply: z.object({ messages: z.array(outboxMessageSchema), mailServer: z.boolean() }),
});
export const getOutboxMessage = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/outbox/:messageId',
  summary: 'One message with its text',
  params: z.object({ teamId: id, messageId: id }),
  reply: outboxMessageSchema.extend({ text: z.string() }),
});
export const downloadOutboxMessage = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/outbox/:messageId/message.eml',
  summary: 'One message as an .eml file',
  params: z.object({ teamId: id, messageId: id }),
  replyKind: 'bytes',
  replyType: 'message/rfc822',
});
