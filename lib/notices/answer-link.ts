import { createHmac, timingSafeEqual } from "node:crypto";

/** What a link says: which notice, and until when it may be used (Unix ms, whole seconds). */
export interface LinkClaim {
  readonly noticeId: string;
  readonly expiresMs: number;
}

const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;
const ID_BYTES = 16;
const TIME_BYTES = 6;

/**
 * The token of an answer link: identifier and expiry, then their HMAC-SHA-256,
 * both in base64url. Nothing in it is secret; without the secret it cannot be made.
 */
export function signLink(secret: string, claim: LinkClaim): string {
  if (!UUID.test(claim.noticeId)) throw new Error("a link is signed for an identifier in lower case only");
  const body = Buffer.alloc(ID_BYTES + TIME_BYTES);
  body.write(claim.noticeId.replaceAll("-", ""), 0, "hex");
  body.writeUIntBE(Math.floor(claim.expiresMs / 1000), ID_BYTES, TIME_BYTES);
  return `${body.toString("base64url")}.${macOf(secret, body).toString("base64url")}`;
}

/**
 * What a genuine token says, expired or not; null for anything that this secret
 * did not sign. The comparison takes the same time wherever the first difference lies.
 */
export function readLink(secret: string, token: string): LinkClaim | null {
  const [bodyText, macText, more] = token.split(".");
  if (!bodyText || !macText || more !== undefined) return null;
  const body = Buffer.from(bodyText, "base64url");
  const mac = Buffer.from(macText, "base64url");
  if (body.length !== ID_BYTES + TIME_BYTES) return null;
  const expected = macOf(secret, body);
  if (mac.length !== expected.length || !timingSafeEqual(mac, expected)) return null;
  // One text for one link: base64 admits stray bits and characters that change nothing.
  if (body.toString("base64url") !== bodyText || mac.toString("base64url") !== macText) return null;
  const hex = body.toString("hex", 0, ID_BYTES);
  const noticeId = hex.replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, "$1-$2-$3-$4-$5");
  return { noticeId, expiresMs: body.readUIntBE(ID_BYTES, TIME_BYTES) * 1000 };
}

/** The prefix keeps a signature for a link from passing as one for anything else. */
function macOf(secret: string, body: Buffer): Buffer {
  return createHmac("sha256", secret).update("answer link\0").update(body).digest();
}
