import { Navigate } from 'react-router-dom';

/** The office opens with campaigns. */
export function Component() {
  return <Navigate to="/steward/campaigns" replace />;
}
