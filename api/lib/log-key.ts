import { createHash, createPrivateKey, createPublicKey, generateKeyPairSync, sign, type KeyObject } from 'node:crypto';

/** The key that signs the heads of the log: Ed25519. */
export interface LogKey {
  /** SHA-256 of the public key, lower-case hex. */
  keyId: string;
  /** SPKI, base64. */
  publicKey: string;
  /** Signature over the bytes, base64. */
  sign: (bytes: Uint8Array) => string;
}

/** @throws Error for anything but an Ed25519 private key in PKCS #8, base64; the value is not repeated */
export const readLogKey = (text: string): LogKey => {
  let key: KeyObject;
  try {
    key = createPrivateKey({ key: Buffer.from(text, 'base64'), format: 'der', type: 'pkcs8' });
  } catch {
    throw new Error('The settings cannot be used:\n  LOG_SIGNING_KEY is not a private key in PKCS #8 form, base64.');
  }
  if (key.asymmetricKeyType !== 'ed25519') throw new Error(`The settings cannot be used:\n  LOG_SIGNING_KEY is a key of the kind ${String(key.asymmetricKeyType)}; the log is signed with Ed25519.`);
  const spki = createPublicKey(key).export({ format: 'der', type: 'spki' });
  return { keyId: createHash('sha256').update(spki).digest('hex'), publicKey: spki.toString('base64'), sign: (bytes) => sign(null, bytes, key).toString('base64') };
};

/** A new key as LOG_SIGNING_KEY takes it. */
export const newLogKey = (): string => generateKeyPairSync('ed25519').privateKey.export({ format: 'der', type: 'pkcs8' }).toString('base64');
