/** The first address of X-Forwarded-For: Next puts the caller's there when no proxy did. */
export function networkAddressOf(forwardedFor: unknown): string {
  return typeof forwardedFor === "string" ? forwardedFor.split(",")[0].trim() : "unknown";
}
