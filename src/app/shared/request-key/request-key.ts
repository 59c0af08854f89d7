/**
 * A key for a request that creates something (`Idempotency-Key`): 128 random bits in hexadecimal. Made from
 * `getRandomValues`, because `randomUUID` is missing where the page did not come over TLS.
 */
export function requestKey(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
