import { Find } from '@/components/shell/find';
import { PageHeader } from '@/components/ui/page-header';
import { plural } from '@/lib/format';
import { readRooms } from '@/lib/calendar/server/read-rooms';
import { requireContextTo } from '@/lib/server/context';
import { RoomsScreen } from './_components/rooms-screen';

export const metadata = { title: 'Rooms' };

export default async function RoomsPage() {
  const context = await requireContextTo('manage', 'Room');
  const { rooms, sites, features } = await readRooms(context);
  return (
    <>
      <PageHeader title="Rooms" sub={`${plural(rooms.length, 'room')} at ${plural(sites.length, 'site')}.`} actions={<Find />} />
      <RoomsScreen rooms={rooms} sites={sites} features={features} />
    </>
  );
}
