import { useLocation, useNavigation, useSearchParams } from 'react-router-dom';

/** The search part of the address as it will be once a running navigation has ended, so that two quick choices do not undo each other. */
export function useAddressSearch(): URLSearchParams {
  const { search, pathname } = useLocation();
  const coming = useNavigation().location;
  return new URLSearchParams(coming?.pathname === pathname ? coming.search : search);
}

/** Changes the address without a new step in the history and without moving the page. */
export function useSetAddressSearch(): (next: URLSearchParams) => void {
  const [, setSearch] = useSearchParams();
  return (next) => setSearch(next, { replace: true, preventScrollReset: true });
}
