import { Loading } from '@/app/components/notes';

export default function MapLoading() {
  return (
    <main id="main">
      <Loading>Reading the records and ranking the stations…</Loading>
    </main>
  );
}
