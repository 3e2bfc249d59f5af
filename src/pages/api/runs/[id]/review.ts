import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getReview } from '~/lib/server/services/reviews';

export const GET = endpoint(routes.review.review, ({ actor, params }) => getReview(actor, params.id));
export const ALL = methodNotAllowed({ GET });
