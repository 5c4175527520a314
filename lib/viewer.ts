import type { Role } from '@/lib/access';

/** The signed-in person on whose behalf a query runs. */
export type Viewer = {
  id: string;
  role: Role;
  name: string;
  department: string | null;
  timeZone: string;
};
