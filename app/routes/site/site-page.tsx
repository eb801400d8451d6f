import type { ComponentProps } from 'react';
import { SiteLayout } from '#app/components/site-layout.tsx';
import { TideStaff } from '#app/components/tide-staff.tsx';
import type { StepKey } from '#app/features/sites/site-steps.ts';
import { useDocumentTitle } from '#app/lib/use-document-title.ts';
import { PersonMenu } from '../shell/person-menu.tsx';
import { useSite } from './use-site.ts';

/** A page of a site: the staff on top with `step` as the current one; the rest as SiteLayout takes it. */
export function SitePage({
  step,
  title,
  ...parts
}: Omit<ComponentProps<typeof SiteLayout>, 'staff'> & {
  step: StepKey;
  /** names the page in the tab, where it is more than its step: `Run 3` */
  title?: string;
}) {
  const { site, teamName, role, steps } = useSite();
  const label = steps.find(({ key }) => key === step)?.label;
  useDocumentTitle(title ?? label, site.name);
  return (
    <SiteLayout
      staff={
        <TideStaff
          title={site.name}
          note={`${site.invented ? 'Invented' : 'Foothold'}: ${teamName}`}
          steps={steps}
          current={step}
          person={<PersonMenu note={role} />}
        />
      }
      {...parts}
    />
  );
}
