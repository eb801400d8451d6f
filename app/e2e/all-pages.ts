/** Every page behind the door, by name. */
export const pagesOf = ({
  teamId,
  siteId,
  runId,
  comparisonId,
}: Record<'teamId' | 'siteId' | 'runId' | 'comparisonId', string>) => ({
  home: '/',
  team: `/team/${teamId}`,
  account: '/account',
  'new-site': `/teams/${teamId}/new-site`,
  ground: `/sites/${siteId}/ground`,
  'ground-engine': `/sites/${siteId}/ground?layer=engine-capacity`,
  plant: `/sites/${siteId}/plant`,
  fit: `/sites/${siteId}/fit`,
  outlook: `/sites/${siteId}/outlook`,
  options: `/sites/${siteId}/options`,
  runs: `/sites/${siteId}/runs`,
  run: `/sites/${siteId}/runs/${runId}?year=2043`,
  compare: `/sites/${siteId}/compare`,
  comparison: `/sites/${siteId}/compare/${comparisonId}`,
  matters: `/sites/${siteId}/compare/${comparisonId}/matters`,
});
