/** The invented people of the demo. */
export const demoPassword = 'lowtide-demo';
export const demoPeople = {
  manager: 'ines@northmarsh.example',
  modeller: 'remi@northmarsh.example',
  trainer: 'tove@northmarsh.example',
  admin: 'ada@northmarsh.example',
} as const;
