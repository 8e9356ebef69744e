import { PAY_RUN_WORDS, type PayRunState } from '@/lib/payroll/pay-run-state';
import { Chip, type ChipTone } from '../ui/chip';

const TONES: Record<PayRunState, ChipTone> = {
  open: 'neutral', gathering: 'wait', with_teachers: 'info', answering_queries: 'wait', ready_to_approve: 'wait', approved: 'info', closed: 'ok', exported: 'ok',
};

export const RunStateChip = ({ state }: { state: PayRunState }) => <Chip tone={TONES[state]}>{PAY_RUN_WORDS[state]}</Chip>;
