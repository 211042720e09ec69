/** Values that an expression has whatever the indices are. */
import type { Expression } from "./tree";

/** The value of an index expression without indices; "open" with indices; "other" for anything else. */
export function constantValue(expression: Expression): bigint | "open" | "other" {
  switch (expression.kind) {
    case "integer":
      return BigInt(expression.value);
    case "index":
      return "open";
    case "negate": {
      const value = constantValue(expression.operand);
      return typeof value === "bigint" ? -value : value;
    }
    case "add":
    case "multiply": {
      const isSum = expression.kind === "add";
      const values = (isSum ? expression.summands : expression.factors).map(constantValue);
      if (values.includes("other")) return "other";
      if (values.includes("open")) return "open";
      return (values as bigint[]).reduce((total, value) => (isSum ? total + value : total * value));
    }
    default:
      return "other";
  }
}
