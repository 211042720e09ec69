import { describe, expect, it } from "vitest";
import { published } from "../../../support/forms";
import { alone } from "./support";

const parity = (...args: Parameters<typeof alone>) => alone(...args).marks.parity;

// 0905.1473 and 1012.6032: conjugation exchanges k and n-4-k; the middle ones go to themselves.
describe("parity of whole superamplitudes", () => {
  it.each([
    ["the six-leg NMHV form, its own conjugate", published.nmhv6, { n: 6, k: 1 }, "the form itself"],
    ["five legs, conjugate to MHV", "[1 2 3 4 5]", { n: 5, k: 1 }, "(5,0,0)"],
    ["seven legs, conjugate to k = 2", published.nmhv, { n: 7, k: 1 }, "(7,2,0)"],
    ["the one-loop box", "<1 2 3 4>^2/(<AB 1 2><AB 2 3><AB 3 4><AB 1 4>)", { n: 4, loops: 1 }, "the form itself"],
    ["chiral pentagons", published.pentagons, { n: 5, loops: 1 }, "(5,1,1)"],
    ["double pentagons", published.doublePentagons, { n: 4, loops: 2 }, "the form itself"],
  ])("holds for %s", (_, notation, size, image) => {
    const found = parity(notation, size);
    expect(found?.state).toBe("holds");
    expect(found?.evidence).toContain(image);
  });

  it.each([
    ["a missing term", "[1 2 3 4 5] + [1 2 3 5 6]", { n: 6, k: 1 }],
    ["twice the amplitude, conjugate to something else", "2 [1 2 3 4 5]", { n: 5, k: 1 }],
    // The even part alone is not the amplitude at n = 5: its image is itself, and not (5,1,1).
    [
      "the even part of one loop",
      "1/2 sum(i, j : 1 <= i, i+1 < j <= n, j != i+n-1) <i-1 i i+1 j><i j-1 j j+1> / (<AB i-1 i><AB i i+1><AB j-1 j><AB j j+1>)",
      { n: 5, loops: 1 },
    ],
  ])("fails for %s", (_, notation, size) => {
    expect(parity(notation, size)?.state).toBe("fails");
  });

  it("is untested where the conjugate is not known, and says which amplitude that is", () => {
    const found = parity(published.doublePentagons, { n: 5, loops: 2 });
    expect(found?.state).toBe("untested");
    expect(found?.evidence).toContain("(5,1,2)");
  });
});
