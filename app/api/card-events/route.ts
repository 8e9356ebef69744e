import { NextResponse, type NextRequest } from 'next/server';
import { takeCardEvent } from '@/lib/tuition/server/take-card-event';

/** The card processor's signed events. The raw text is checked before anything reads it. */
export const POST = async (request: NextRequest): Promise<NextResponse> => {
  const { status, message } = await takeCardEvent(await request.text(), request.headers.get('stripe-signature') ?? '');
  return NextResponse.json({ message }, { status });
};
