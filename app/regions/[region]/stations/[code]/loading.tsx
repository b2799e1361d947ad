import { Loading } from '@/app/components/notes';

export default function StationLoading() {
  return (
    <main id="main">
      <Loading>Reading the station’s record…</Loading>
    </main>
  );
}
