/** What every brief prints, whatever people write in it. */
export const cautions: readonly string[] = [
  'A simulation supports a decision; it is no permit, survey or engineering design.',
  'Moving bivalves or plants between water bodies can need permits and biosecurity checks.',
  'Intertidal field work needs tide, weather and mud precautions.',
  'Follow local codes and licensed practice.',
];
