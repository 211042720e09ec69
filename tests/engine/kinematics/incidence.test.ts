import fc from "fast-check";
import { det } from "mathjs";
import { describe, expect, it } from "vitest";
import { MERSENNE_61, primeField, rational, rationals, series, smallPrimeField } from "../../../engine/fields";
import {
  bracket,
  determinant,
  leg,
  lineBracket,
  lineThrough,
  meet,
  meetOfLineAndPlane,
  meetOfPlanes,
  type Point,
  planeAt,
  planeOf,
  planeThrough,
  type Superplane,
  type Supertwistor,
  type Twistor,
} from "../../../engine/kinematics";

const field = primeField(MERSENNE_61);
const residue = fc.bigInt({ min: 0n, max: MERSENNE_61 - 1n });
const twistor: fc.Arbitrary<Twistor<bigint>> = fc.tuple(residue, residue, residue, residue);
const twistors = (count: number) => fc.tuple(...Array.from({ length: count }, () => twistor));
const scaled = (x: bigint, z: Twistor<bigint>): Twistor<bigint> => z.map((c) => field.multiply(x, c));
const sum = (...zs: Twistor<bigint>[]): Twistor<bigint> =>
  zs.reduce((a, b) => a.map((x, i) => field.add(x, b[i]!)), [0n, 0n, 0n, 0n]);
const minus = (z: Twistor<bigint>): Twistor<bigint> => z.map(field.negate);
const angle4 = (...z: Twistor<bigint>[]): bigint => bracket(field, z[0]!, z[1]!, z[2]!, z[3]!);

describe("determinants", () => {
  it("agree with mathjs on integer matrices of every size", () => {
    for (let size = 1; size <= 11; size++) {
      const entry = fc.integer({ min: -3, max: 3 });
      const matrix = fc.array(fc.array(entry, { minLength: size, maxLength: size }), {
        minLength: size,
        maxLength: size,
      });
      fc.assert(
        fc.property(matrix, (rows) => {
          const exact = determinant(
            rationals,
            rows.map((row) => row.map((x) => rational(BigInt(x)))),
          );
          expect(rationals.toText(exact)).toBe((Math.round(det(rows)) + 0).toString().replace(/^-0$/, "0"));
        }),
        { numRuns: 20 },
      );
    }
  });

  it("agree with PARI/GP 2.15.2 (matdet) over rationals and modulo primes", () => {
    const rows = ["1/2 -3 5/7 2 0", "4 1/3 -2 0 1", "-1/5 2 3 1/2 -4", "6 0 -1/9 1 2", "3 -2 1/4 0 5/11"].map((row) =>
      row.split(" ").map((x) => {
        const [p, q] = x.split("/");
        return rational(BigInt(p!), BigInt(q ?? "1"));
      }),
    );
    expect(rationals.toText(determinant(rationals, rows))).toBe("4722569/16632");
    const large = rows.map((row) =>
      row.map((x) => field.multiply(field.fromInteger(x.numerator), field.inverse(x.denominator)!)),
    );
    expect(determinant(field, large)).toBe(319562778754062607n);
    const small = smallPrimeField(2147483629);
    const machine = rows.map((row) =>
      row.map((x) => small.multiply(small.fromInteger(x.numerator), small.inverse(small.fromInteger(x.denominator))!)),
    );
    expect(determinant(small, machine)).toBe(1266772884);
  });

  it("multiply, on both sides of the size where the method changes", () => {
    for (const size of [8, 9]) {
      const rows = (seed: number) =>
        Array.from({ length: size }, (_, i) =>
          Array.from({ length: size }, (_, j) => BigInt((i * 31 + j * 17 + i * j * seed + seed) % 101)),
        );
      const [a, b] = [rows(3), rows(7)];
      const ab = a.map((row) =>
        row.map((_, j) => row.reduce((s, x, i) => field.add(s, field.multiply(x, b[i]![j]!)), 0n)),
      );
      expect(determinant(field, ab)).toBe(field.multiply(determinant(field, a), determinant(field, b)));
    }
    expect(determinant(field, [])).toBe(1n);
    expect(() => determinant(field, [[1n, 2n]])).toThrow("determinant: expected rows of length 1, got 2");
  });

  it("lose no term of a series to a division", () => {
    const s = series(field, 3);
    const e = s.parameter;
    const [one, zero] = [s.one, s.zero];
    expect(
      s.toText(
        determinant(s, [
          [e, one],
          [zero, e],
        ]),
      ),
    ).toBe("(1) e^2 + (0) e^3 + (0) e^4 + O(e^5)");
  });
});

describe("brackets", () => {
  it("<a b c d> is the determinant of the four twistors as rows", () => {
    fc.assert(fc.property(twistors(4), (rows) => angle4(...rows) === determinant(field, rows)));
    // PARI/GP 2.15.2: matdet([1,2,3,4;5,6,7,9;2,0,1,1;-3,1,4,8]).
    const rows = [
      [1n, 2n, 3n, 4n],
      [5n, 6n, 7n, 9n],
      [2n, 0n, 1n, 1n],
      [field.fromInteger(-3n), 1n, 4n, 8n],
    ];
    expect(angle4(...rows)).toBe(field.fromInteger(-25n));
  });

  it("a plane's form is <Z a b c>, from points or from a line and a point", () => {
    fc.assert(
      fc.property(twistors(4), ([z, a, b, c]) => {
        const value = angle4(z!, a!, b!, c!);
        const fromLine = planeOf(field, lineThrough(field, b!, c!), a!);
        return planeAt(field, planeThrough(field, a!, b!, c!), z!) === value && planeAt(field, fromLine, z!) === value;
      }),
    );
  });
});

describe("meets (the two expressions of the notation's page)", () => {
  it("(a b) cap (c d e) = Z_a <b c d e> - Z_b <a c d e> = -(Z_c <d e a b> + Z_d <e c a b> + Z_e <c d a b>)", () => {
    fc.assert(
      fc.property(twistors(5), ([a, b, c, d, e]) => {
        const point = meetOfLineAndPlane(field, lineThrough(field, a!, b!), planeThrough(field, c!, d!, e!));
        const onLine = sum(scaled(angle4(b!, c!, d!, e!), a!), minus(scaled(angle4(a!, c!, d!, e!), b!)));
        const inPlane = minus(
          sum(
            scaled(angle4(d!, e!, a!, b!), c!),
            scaled(angle4(e!, c!, a!, b!), d!),
            scaled(angle4(c!, d!, a!, b!), e!),
          ),
        );
        expect(point).toEqual(onLine);
        expect(point).toEqual(inPlane);
      }),
    );
  });

  it("(a b c) cap (d e f) is the line L with <P Q L> = <P a b c><Q d e f> - <Q a b c><P d e f>", () => {
    fc.assert(
      fc.property(twistors(8), ([p, q, a, b, c, d, e, f]) => {
        const l = meetOfPlanes(field, planeThrough(field, a!, b!, c!), planeThrough(field, d!, e!, f!));
        const expected = field.subtract(
          field.multiply(angle4(p!, a!, b!, c!), angle4(q!, d!, e!, f!)),
          field.multiply(angle4(q!, a!, b!, c!), angle4(p!, d!, e!, f!)),
        );
        expect(lineBracket(field, lineThrough(field, p!, q!), l)).toBe(expected);
        expect(lineBracket(field, l, l)).toBe(0n);
        // A plane through L, and a point of L, are where they should be.
        const point = meetOfLineAndPlane(field, l, planeThrough(field, p!, q!, a!));
        expect(angle4(point, a!, b!, c!)).toBe(0n);
        expect(angle4(point, d!, e!, f!)).toBe(0n);
      }),
    );
  });

  it("where every chi is one linear map of its twistor, so is that of a meet, from the line or from the plane", () => {
    fc.assert(
      fc.property(twistors(5), fc.array(twistors(2), { minLength: 4, maxLength: 4 }), (zs, maps) => {
        const chiOf = (z: Twistor<bigint>) =>
          maps.map((rows) => rows.map((row) => row.reduce((s, x, i) => field.add(s, field.multiply(x, z[i]!)), 0n)));
        const [a, b, c, d, e] = zs.map((z) => ({ z, chi: chiOf(z) })) as Supertwistor<bigint>[];
        const line = lineThrough(field, a!.z, b!.z);
        const plane: Superplane<bigint> = { plane: planeThrough(field, c!.z, d!.z, e!.z), points: [c!, d!, e!] };
        const fromLine = meet(field, { line, points: [a!, b!] }, { ...plane, points: null });
        const fromPlane = meet(field, { line, points: null }, plane);
        expect(fromLine.chi).toEqual(chiOf(fromLine.z));
        expect(fromPlane).toEqual(fromLine);
        expect(meet(field, { line, points: null }, { ...plane, points: null }).chi).toBeNull();
      }),
    );
  });

  it("the Grassmann part is that of the line where both have one", () => {
    const at = (z: Twistor<bigint>, x: bigint): Supertwistor<bigint> => ({ z, chi: [[x], [x], [x], [x]] });
    const [a, b] = [at([1n, 0n, 0n, 0n], 5n), at([0n, 1n, 0n, 0n], 7n)];
    const [c, d, e] = [at([1n, 1n, 0n, 1n], 0n), at([0n, 0n, 1n, 0n], 0n), at([0n, 1n, 0n, 2n], 0n)];
    const found = meet(
      field,
      { line: lineThrough(field, a.z, b.z), points: [a, b] },
      { plane: planeThrough(field, c.z, d.z, e.z), points: [c, d, e] },
    );
    const [bcde, acde] = [angle4(b.z, c.z, d.z, e.z), angle4(a.z, c.z, d.z, e.z)];
    const chi = field.subtract(5n * bcde, field.multiply(7n, acde)) % MERSENNE_61;
    expect(found.chi).toEqual([[chi], [chi], [chi], [chi]]);
    expect(chi).not.toBe(0n);
  });

  it("a leg carries its chi", () => {
    const point = { twistors: [[1n, 2n, 3n, 4n]], chi: [[[9n], [8n], [7n], [6n]]] } as unknown as Point<bigint>;
    expect(leg(point, 1)).toEqual({ z: [1n, 2n, 3n, 4n], chi: [[9n], [8n], [7n], [6n]] });
  });
});
