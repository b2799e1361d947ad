import { Loading } from '@/app/components/notes';

export default function ImportLoading() {
  return (
    <main id="main">
      <Loading>Opening the list of imports…</Loading>
    </main>
  );
}
