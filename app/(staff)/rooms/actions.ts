'use server';

import { revalidatePath } from 'next/cache';
import { roomSchema } from '@/lib/calendar/schema';
import { addRoom } from '@/lib/calendar/server/read-rooms';
import { action } from '@/lib/server/action';

export const saveRoom = action(roomSchema, async (input, context) => {
  const added = await addRoom(input, context);
  revalidatePath('/rooms');
  return added;
});
