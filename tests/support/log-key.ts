/** A key for tests only: made with `openssl genpkey -algorithm ed25519`, PKCS #8, base64. */
export const testLogKey = 'MC4CAQAwBQYDK2VwBCIEIFYavRiRaZ8IegWVqzNjvl9KlkPPW8/4GW9Ifc/YgD8N';
