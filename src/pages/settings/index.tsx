import { Suspense } from 'react';
import { redirect, useParams, type LoaderFunctionArgs } from 'react-router';
import type { Area } from '../../../shared/roles';
import { PanelBoundary, RouteError } from '../../components/ui/error-panel';
import { Page } from '../../components/ui/page';
import { RowsSkeleton } from '../../components/ui/skeleton';
import { Tabs } from '../../components/ui/tabs';
import { Audit } from '../../features/settings/audit';
import { Families } from '../../features/settings/families';
import { Keys } from '../../features/settings/keys';
import { Mail } from '../../features/settings/mail';
import { People } from '../../features/settings/people';
import { ShopForm } from '../../features/settings/shop-form';
import { Technicians } from '../../features/settings/technicians';
import { You } from '../../features/settings/you';
import { requireArea } from '../../lib/require-area';
import { useCan } from '../../lib/session';
import { paths, SETTINGS_SECTIONS, type SettingsSection } from '../../paths';

const SECTIONS: Record<
  SettingsSection,
  { label: string; area: Area | null; Content: () => React.ReactNode }
> = {
  you: { label: 'You', area: null, Content: You },
  shop: { label: 'Shop', area: 'administration', Content: ShopForm },
  people: { label: 'People', area: 'administration', Content: People },
  technicians: { label: 'Technician names', area: 'administration', Content: Technicians },
  families: { label: 'Families', area: 'dictionary', Content: Families },
  keys: { label: 'Keys', area: 'administration', Content: Keys },
  mail: { label: 'E-mail', area: 'administration', Content: Mail },
  audit: { label: 'What was changed', area: 'administration', Content: Audit },
};

const sectionOf = (name: string | undefined) => SETTINGS_SECTIONS.find((section) => section === name);

export async function loader({ params }: LoaderFunctionArgs) {
  const section = sectionOf(params['section']);
  if (!section) return redirect(paths.settings());
  const { area } = SECTIONS[section];
  if (area !== null) await requireArea(area);
  return null;
}

export const ErrorBoundary = RouteError;

export function Component() {
  const section = sectionOf(useParams()['section']) ?? 'you';
  const { can } = useCan();
  const open = SETTINGS_SECTIONS.filter((name) => {
    const { area } = SECTIONS[name];
    return area === null || can(area);
  });
  const { Content, label } = SECTIONS[section];
  return (
    <Page title="Settings" documentTitle={`${label}, settings`}>
      <Tabs
        label="Settings"
        tabs={open.map((name) => ({ to: paths.settings(name), label: SECTIONS[name].label }))}
      />
      <PanelBoundary key={section}>
        <Suspense fallback={<RowsSkeleton />}>
          <div className="flex flex-col gap-6">
            <Content />
          </div>
        </Suspense>
      </PanelBoundary>
    </Page>
  );
}
