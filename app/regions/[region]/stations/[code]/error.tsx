'use client';
import { PageError } from '@/app/components/page-error';

export default function StationError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="The station’s page could not be made" error={error} reset={reset} />;
}
