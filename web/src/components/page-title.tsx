/** The title of the browser tab. React lifts it into the head. */
export function PageTitle({ children }: { children: string }) {
  return <title>{`${children} | Evenbeam`}</title>;
}
