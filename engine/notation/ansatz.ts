/** Checks that an ansatz is linear in its unknowns. */
import type { Faults } from "./faults";
import type { Expression, Formula } from "./tree";

/** Whether unknowns occur, looking into definitions; where they do not occur linearly that is reported. */
class Linearity {
  private readonly definitions = new Map<string, boolean>();

  constructor(private readonly faults: Faults) {}

  define(name: string, expression: Expression): void {
    this.definitions.set(name, this.holds(expression));
  }

  holds(expression: Expression): boolean {
    switch (expression.kind) {
      case "unknown":
        return true;
      case "call":
        return this.definitions.get(expression.name) ?? false;
      case "add":
        return expression.summands.map((summand) => this.holds(summand)).includes(true);
      case "negate":
        return this.holds(expression.operand);
      case "multiply": {
        const holding = expression.factors.filter((factor) => this.holds(factor));
        if (holding.length > 1) this.report(expression, "Two factors of a product hold unknowns.");
        return holding.length > 0;
      }
      case "divide":
        if (this.holds(expression.denominator)) this.report(expression.denominator, "A denominator holds an unknown.");
        return this.holds(expression.numerator);
      case "power":
        if (!this.holds(expression.base)) return false;
        this.report(expression, "A power holds an unknown.");
        return true;
      case "product":
        if (!this.holds(expression.body)) return false;
        this.report(expression, "A product over indices holds an unknown.");
        return true;
      case "sum":
      case "cyc":
      case "sym":
        return this.holds(expression.body);
      default:
        return false;
    }
  }

  private report({ span }: Expression, message: string): void {
    this.faults.add("not-linear", span, message, {
      help: "An ansatz is a sum of known expressions, each times one unknown.",
    });
  }
}

/** Reports every place where unknowns are multiplied, divided by or raised to a power. The tree is at most `deepestTree` deep. */
export function checkAnsatz(formula: Formula, faults: Faults): void {
  const linearity = new Linearity(faults);
  for (const { name, value } of formula.definitions) {
    if (value.kind === "scalar") linearity.define(name, value.expression);
  }
  linearity.holds(formula.expression);
}
