import { useParams } from 'react-router-dom';
import { ReviewDesk } from '#web/features/reviews/components/review-desk.tsx';

/** The queue, and the case of the address if there is one. One route, so that the Done message outlives the change of case. */
export function Component() {
  const { id } = useParams();
  return <ReviewDesk id={id ?? null} />;
}
