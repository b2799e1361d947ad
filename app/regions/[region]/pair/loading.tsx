import { Loading } from '@/app/components/notes';

export default function PairLoading() {
  return (
    <main id="main">
      <Loading>Comparing the records…</Loading>
    </main>
  );
}
