'use server';

import { revalidatePath } from 'next/cache';
import { bookSchema, deskEnquirySchema } from '@/lib/calendar/schema';
import { bookByHand } from '@/lib/calendar/server/book-by-hand';
import { takeEnquiry } from '@/lib/calendar/server/take-enquiry';
import { action } from '@/lib/server/action';

export const book = action(bookSchema, async (input, context) => {
  const booked = await bookByHand(input, context);
  revalidatePath('/today');
  return booked;
});

export const saveEnquiry = action(deskEnquirySchema, async (input, context) => {
  const taken = await takeEnquiry(input, context);
  revalidatePath('/enquiries');
  return taken;
});
