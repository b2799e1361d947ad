import { Loading } from '@/app/components/notes';

export default function EvidenceLoading() {
  return (
    <main id="main">
      <Loading>Ranking the stations…</Loading>
    </main>
  );
}
