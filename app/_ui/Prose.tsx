import { Fragment } from "react";
import { Bound } from "./Bound";
import { Bracket } from "./Formula";

/** A sentence of the engine, with the brackets and bounds in it set as in a formula. */
export function Prose({ text }: { text: string }) {
  return (
    <>
      {text.split(/(2\^-\d+|<[^<>=]+>)/).map((piece, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of one sentence never move
        <Fragment key={index}>
          {index % 2 === 0 ? piece : piece.startsWith("<") ? <Bracket text={piece} /> : <Bound bound={piece} />}
        </Fragment>
      ))}
    </>
  );
}
