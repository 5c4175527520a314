import type { Metadata } from 'next';
import { close, open, saveCountry, saveWeek, saveZone } from './actions';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { ClosureForm } from '@/components/schedule/closure-form';
import { ClosureList } from '@/components/schedule/closure-list';
import { HolidayForm } from '@/components/schedule/holiday-form';
import { HoursForm } from '@/components/schedule/hours-form';
import { ShopZoneForm } from '@/components/schedule/zone-form';
import { requireShopCalendar } from '@/db/queries/shop-calendar';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { dayOf } from '@/lib/schedule/calendar';
import { listHolidayCountries, listHolidayRegions } from '@/lib/schedule/holidays';

export const metadata: Metadata = { title: 'Working calendar' };

export default async function CalendarPage() {
  const viewer = await pageViewer();
  const nowMs = requestMs();
  const { zone, country, region, hours, closures } = await orNotFound(requireShopCalendar(viewer, nowMs));
  const [countries, regions] = await Promise.all([
    listHolidayCountries(),
    country === null ? [] : listHolidayRegions(country),
  ]);
  return (
    <PageFrame
      title="Working calendar"
      intro="When the shop works. Ready windows and the days by which questions are answered are reckoned on it."
      tools={
        <>
          <PageSection title="Closed, or closed early">
            <ClosureForm add={close} />
          </PageSection>
          <PageSection title="Public holidays">
            <HolidayForm save={saveCountry} countries={countries} regions={regions} country={country} region={region} />
          </PageSection>
          <PageSection title="The shop’s clock">
            <ShopZoneForm save={saveZone} zone={zone} />
          </PageSection>
        </>
      }
    >
      <PageSection title="The week">
        <HoursForm save={saveWeek} hours={hours} />
      </PageSection>
      <PageSection title="Days off">
        <ClosureList closures={closures} open={open} today={dayOf(nowMs, zone)} />
      </PageSection>
    </PageFrame>
  );
}
