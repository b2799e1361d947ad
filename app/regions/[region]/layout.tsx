import { notFound } from 'next/navigation';
import type { ReactNode } from 'react';
import { getRegion } from '@/lib/store/regions';

interface LayoutProps {
  params: Promise<{ region: string }>;
  children: ReactNode;
}

/** Asks for the region before any loading note is sent, so that an unknown one is answered with 404. */
export default async function RegionLayout({ params, children }: LayoutProps) {
  if (!(await getRegion((await params).region))) notFound();
  return children;
}
