'use client';

import { Fault } from '@/components/shell/fault';

export default Fault;
