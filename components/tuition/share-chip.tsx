import { Chip } from '../ui/chip';
import { SHARE_TONES, SHARE_WORDS, type ShareState } from '@/lib/tuition/share-state';

export const ShareChip = ({ state }: { state: ShareState }) => <Chip tone={SHARE_TONES[state]}>{SHARE_WORDS[state]}</Chip>;
