/** An address of this site to go on to; anything else, such as another site's, becomes the front page. */
export function safePath(wanted: string | null | undefined): string {
  if (!wanted) return "/";
  const here = "http://here.invalid";
  if (!URL.canParse(wanted, here)) return "/";
  const url = new URL(wanted, here);
  const isOurs = url.origin === here && wanted.startsWith("/") && !wanted.startsWith("//");
  return isOurs && url.pathname !== "/sign-in" ? url.pathname + url.search + url.hash : "/";
}
