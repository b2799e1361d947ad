'use client';
import { PageError } from './components/page-error.tsx';

export default function SiteError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return <PageError what="This page could not be made" error={error} reset={reset} />;
}
