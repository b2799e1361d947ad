import { Loading } from '@/app/components/notes';

export default function CurvesLoading() {
  return (
    <main id="main">
      <Loading>Laying out the duration curves…</Loading>
    </main>
  );
}
