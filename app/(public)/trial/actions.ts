'use server';

import { enquirySchema } from '@/lib/calendar/schema';
import { receiveEnquiry } from '@/lib/calendar/server/receive-enquiry';
import { publicAction } from '@/lib/server/action';
import { publicMoment } from '@/lib/server/request-facts';

export const sendEnquiry = publicAction(enquirySchema, async (input) => receiveEnquiry(input, await publicMoment()));
