'use client';

import { Printer } from 'lucide-react';
import { Button } from './button';

export const PrintButton = ({ label = 'Print' }: { label?: string }) => <Button className="no-print" icon={<Printer size={16} aria-hidden />} onClick={() => window.print()}>{label}</Button>;
