import { Loading } from '@/app/components/notes';

export default function RecordsLoading() {
  return (
    <main id="main">
      <Loading>Counting the days of the records…</Loading>
    </main>
  );
}
