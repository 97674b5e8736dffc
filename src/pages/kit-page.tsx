import type { ReactNode } from 'react';
import { useSearchParams } from 'react-router-dom';
import { DayLayout } from '../app/layouts/day-layout.tsx';
import { DimLayout } from '../app/layouts/dim-layout.tsx';
import { Button } from '../ui/button.tsx';
import { ButtonSection } from '../ui/gallery/button-section.tsx';
import { CourseSection } from '../ui/gallery/course-section.tsx';
import { FieldSection } from '../ui/gallery/field-section.tsx';
import { OverlaySection } from '../ui/gallery/overlay-section.tsx';
import { PhoneSection } from '../ui/gallery/phone-section.tsx';
import { ReportSection } from '../ui/gallery/report-section.tsx';
import { ScaleSection } from '../ui/gallery/scale-section.tsx';
import { StateSection } from '../ui/gallery/state-section.tsx';
import { TableSection } from '../ui/gallery/table-section.tsx';
import { MenuHeading, MenuItem, MenuLink, MenuSeparator } from '../ui/menu.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const links = [
  { to: '/kit', label: 'Kit' },
  { to: '/studies', label: 'Studies' },
  { to: '/cables', label: 'Cables' },
  { to: '/sessions', label: 'Sessions' },
  { to: '/reports', label: 'Reports' },
];

/** Every part of the interface with believable content, in the theme that the address names. For development only. */
export function Component() {
  const [search, setSearch] = useSearchParams();
  const isDim = search.get('theme') === 'dim';
  const change = () => setSearch(isDim ? {} : { theme: 'dim' });
  return (
    <Theme isDim={isDim} onChange={change}>
      <PageHeader
        title="Every part, in one place"
        lede="Day for planning, reading and publishing; dim for everything that happens while people listen."
        back={{ to: '/', label: 'Start' }}
        actions={<Button onClick={change}>{isDim ? 'Show it by day' : 'Show it in the dim'}</Button>}
      />
      <ScaleSection />
      <ButtonSection />
      <CourseSection />
      <PhoneSection />
      <FieldSection />
      <TableSection />
      <StateSection />
      <OverlaySection />
      <ReportSection />
    </Theme>
  );
}

type ThemeProps = { isDim: boolean; onChange: () => void; children: ReactNode };

function Theme({ isDim, onChange, children }: ThemeProps) {
  if (isDim) {
    return (
      <DimLayout header={<p className="border-b border-rule px-5 py-4 font-bold sm:px-8 lg:px-12">Study Heron</p>}>
        <div className="mx-auto w-full max-w-[86rem] px-5 py-8 sm:px-8 lg:px-12">{children}</div>
      </DimLayout>
    );
  }
  const menu = (
    <>
      <MenuHeading>Product manager</MenuHeading>
      <MenuLink to="/kit">Your organisation</MenuLink>
      <MenuItem onSelect={onChange}>Show it in the dim</MenuItem>
      <MenuSeparator />
      <MenuItem onSelect={onChange}>Sign out</MenuItem>
    </>
  );
  return (
    <DayLayout homeTo="/" links={links} person={{ label: 'Maren Aldous', menu }}>
      {children}
    </DayLayout>
  );
}
