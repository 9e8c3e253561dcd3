import type { Metadata } from 'next';
import { FieldApp } from '@/components/field/field-app';

/** One static page for every path under /field. It holds nothing of a person: that is drawn from the device's store. */
export const dynamic = 'force-static';

export const metadata: Metadata = { title: 'On site' };

export default function FieldPage() {
  return <FieldApp />;
}
