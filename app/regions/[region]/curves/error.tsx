'use client';
import { PageError } from '@/app/components/page-error';

export default function CurvesError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="The duration curves could not be made" error={error} reset={reset} />;
}
