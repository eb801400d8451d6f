import type { Role } from '#contract/people.ts';

export interface DemoAccount {
  role: Role;
  name: string;
  email: string;
  password: string;
}

/** The invented people of the demo, one for each role. Their password is public, so they can sign in only while the demo is on. */
export const demoAccounts: readonly DemoAccount[] = [
  { role: 'manager', name: 'Ines Marlow', email: 'ines@northmarsh.example', password: 'lowtide-demo' },
  { role: 'modeller', name: 'Remi Calder', email: 'remi@northmarsh.example', password: 'lowtide-demo' },
  { role: 'trainer', name: 'Tove Ashby', email: 'tove@northmarsh.example', password: 'lowtide-demo' },
  { role: 'admin', name: 'Ada Fenner', email: 'ada@northmarsh.example', password: 'lowtide-demo' },
];

/** Whether an address belongs to the demo. */
export const isDemoAddress = (email: string): boolean =>
  demoAccounts.some((account) => account.email === email);
