import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { Sha256, sha256 } from "../../engine/sha256";

const hex = (bytes: Uint8Array): string => Buffer.from(bytes).toString("hex");
const text = (s: string): Uint8Array => new TextEncoder().encode(s);

describe("SHA-256", () => {
  // Examples of FIPS 180-4 (NIST's "SHA256" example values) and of FIPS 180-2, appendix B.
  it.each([
    ["", "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855"],
    ["abc", "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"],
    [
      "abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq",
      "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1",
    ],
    [
      "abcdefghbcdefghicdefghijdefghijkefghijklfghijklmghijklmnhijklmnoijklmnopjklmnopqklmnopqrlmnopqrsmnopqrstnopqrstu",
      "cf5b16a778af8380036ce59e7b0492370b249b11e8f07a51afac45037afee9d1",
    ],
  ])("of %j", (message, digest) => {
    expect(hex(sha256(text(message)))).toBe(digest);
  });

  it("of a million letters a, in pieces (FIPS 180-2, B.3)", () => {
    const hash = new Sha256();
    const piece = text("a".repeat(1000));
    for (let i = 0; i < 1000; i++) hash.update(piece);
    expect(hex(hash.digest())).toBe("cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
  });

  it("agrees with the platform's own implementation, whole and in pieces", () => {
    fc.assert(
      fc.property(fc.array(fc.uint8Array({ maxLength: 200 }), { maxLength: 6 }), (pieces) => {
        const whole = Buffer.concat(pieces);
        const expected = createHash("sha256").update(whole).digest("hex");
        const hash = new Sha256();
        for (const piece of pieces) hash.update(piece);
        expect(hex(hash.digest())).toBe(expected);
        expect(hex(sha256(whole))).toBe(expected);
      }),
    );
  });

  it("refuses to go on after the digest was taken", () => {
    const hash = new Sha256();
    hash.digest();
    expect(() => hash.update(text("x"))).toThrow("already taken");
    expect(() => hash.digest()).toThrow("already taken");
  });
});
