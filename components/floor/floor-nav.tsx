import { SubNav } from '@/components/shell/sub-nav';

const links = [
  { href: '/floor', label: 'Floor' },
  { href: '/floor/load', label: 'Load' },
  { href: '/floor/windows', label: 'Windows' },
];

/** The way between the pages of the floor. */
export const FloorNav = () => <SubNav label="Floor" links={links} />;
