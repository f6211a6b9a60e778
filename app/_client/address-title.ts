/** "hollin-deep" -> "Hollin deep": a window's title, before the name itself has been loaded. */
export function titleOfAddress(slug: string): string {
  const words = decodeURIComponent(slug).replace(/-+/g, " ").trim();
  return words === "" ? words : words[0].toUpperCase() + words.slice(1);
}
