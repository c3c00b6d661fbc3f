/**
 * Detached signatures as `ssh-keygen -Y` makes and checks them (OpenSSH's PROTOCOL.sshsig), Ed25519 with SHA-512, namespace `file`.
 * In: a message and a key, or a signature. Out: the signature's text, or what it is worth. Never: two texts for one signature.
 */
import { createHash, sign as signBytes, verify as verifyBytes } from 'node:crypto';
import { field, Fields, FieldsError, number } from './ssh-fields.ts';
import { KEY_TYPE, publicKeyOf, type SigningKey } from './ssh-key.ts';

const MAGIC = Buffer.from('SSHSIG', 'latin1');
export const NAMESPACE = 'file';
const HASH = 'sha512';
/** As ssh-keygen breaks its lines. */
const LINE = 70;

/** What is signed: the message by its hash alone. */
const signed = (message: Uint8Array): Buffer =>
  Buffer.concat([MAGIC, field(NAMESPACE), field(''), field(HASH), field(createHash(HASH).update(message).digest())]);

export function signMessage(message: Uint8Array, { key, publicBlob }: SigningKey): string {
  return signatureText(publicBlob, signBytes(null, signed(message), key));
}

function signatureText(publicBlob: Uint8Array, signature: Uint8Array): string {
  const blob = Buffer.concat([
    MAGIC,
    number(1),
    field(publicBlob),
    field(NAMESPACE),
    field(''),
    field(HASH),
    field(Buffer.concat([field(KEY_TYPE), field(signature)])),
  ]);
  const lines = blob.toString('base64').match(new RegExp(`.{1,${LINE}}`, 'g')) ?? [];
  return `-----BEGIN SSH SIGNATURE-----\n${lines.join('\n')}\n-----END SSH SIGNATURE-----\n`;
}

/** The public key that made the signature of this message; null where the text is no such signature, byte for byte. */
export function signerOf(message: Uint8Array, text: string): Uint8Array | null {
  const armour = /^-----BEGIN SSH SIGNATURE-----\n([A-Za-z0-9+/=\n]+)\n-----END SSH SIGNATURE-----\n$/.exec(text);
  const blob = Buffer.from(armour?.[1] ?? '', 'base64');
  if (!blob.subarray(0, MAGIC.length).equals(MAGIC)) return null;
  try {
    const fields = new Fields(blob.subarray(MAGIC.length));
    fields.number();
    const publicBlob = fields.string();
    for (let other = 0; other < 3; other += 1) fields.string();
    const inner = new Fields(fields.string());
    inner.string();
    const signature = inner.string();
    const key = publicKeyOf(publicBlob);
    // Written again it must be the same text: no other version, namespace, hash or rest.
    if (key === null || signatureText(publicBlob, signature) !== text) return null;
    return verifyBytes(null, signed(message), key, signature) ? Uint8Array.from(publicBlob) : null;
  } catch (error) {
    if (error instanceof FieldsError) return null;
    throw error;
  }
}
