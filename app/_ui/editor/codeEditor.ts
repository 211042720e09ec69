/** The code editor of the formula: CodeMirror with the notation's own highlighting and the faults underlined. */
import { defaultKeymap, history, historyKeymap } from "@codemirror/commands";
import { bracketMatching, HighlightStyle, StreamLanguage, syntaxHighlighting } from "@codemirror/language";
import { EditorState, StateEffect, StateField } from "@codemirror/state";
import { Decoration, type DecorationSet, drawSelection, EditorView, keymap } from "@codemirror/view";
import { tags } from "@lezer/highlight";
import type { Diagnostic } from "../../../engine/result";

const words = new Set(["sum", "prod", "cyc", "sym", "let", "cap", "bar", "delta", "s", "x2"]);
const loopWord = /^(AB|CD|EF|GH|[A-H]|X)$/;

/** Colours by kind of token; the meaning is the parser's, so nothing here can refuse a text. */
const language = StreamLanguage.define({
  token(stream) {
    if (stream.eatSpace()) return null;
    if (stream.match(/^#.*/)) return "comment";
    if (stream.match(/^\d+/)) return "number";
    const word = stream.match(/^\??[\p{L}_][\p{L}\p{N}_]*/u);
    if (word !== null && word !== true && word !== false) {
      const text = word[0];
      if (words.has(text)) return "keyword";
      return loopWord.test(text) ? "atom" : "variableName";
    }
    if (stream.match(/^[<>[\]|()⟨⟩]/)) return "bracket";
    stream.next();
    return "operator";
  },
});

const colours = HighlightStyle.define([
  { tag: tags.comment, color: "var(--comment)", fontStyle: "italic" },
  { tag: tags.keyword, color: "var(--word)", fontWeight: "600" },
  { tag: tags.number, color: "var(--number)" },
  { tag: tags.atom, color: "var(--name)", fontWeight: "600" },
  { tag: tags.variableName, color: "var(--name)" },
  { tag: tags.bracket, color: "var(--ink-soft)" },
  { tag: tags.operator, color: "var(--ink)" },
]);

const look = EditorView.theme({
  "&": { height: "100%", fontSize: "var(--size-code)", color: "var(--ink)", backgroundColor: "var(--paper)" },
  "&.cm-focused": { outline: "0.16rem solid var(--link)", outlineOffset: "0.1rem" },
  ".cm-scroller": { fontFamily: "var(--font-code)", lineHeight: "1.5", overflow: "auto" },
  ".cm-content": { caretColor: "var(--ink)", padding: "0.75rem 0" },
  ".cm-line": { padding: "0 1rem" },
  ".cm-cursor": { borderLeftColor: "var(--ink)", borderLeftWidth: "2px" },
  "&.cm-focused > .cm-scroller > .cm-selectionLayer .cm-selectionBackground, .cm-selectionBackground": {
    backgroundColor: "var(--mark)",
  },
  "&.cm-focused .cm-matchingBracket": { backgroundColor: "var(--mark)", outline: "1px solid var(--rule-strong)" },
  "&.cm-focused .cm-nonmatchingBracket": { backgroundColor: "var(--fault-wash)" },
  ".cm-fault": {
    textDecoration: "underline wavy var(--fault) 1px",
    textUnderlineOffset: "0.25em",
    backgroundColor: "var(--fault-wash)",
  },
});

const setFaults = StateEffect.define<readonly Diagnostic[]>();

const faults = StateField.define<DecorationSet>({
  create: () => Decoration.none,
  update(marks, transaction) {
    for (const effect of transaction.effects) {
      if (effect.is(setFaults)) return decorate(effect.value, transaction.state.doc.length);
    }
    return marks.map(transaction.changes);
  },
  provide: (field) => EditorView.decorations.from(field),
});

function decorate(diagnostics: readonly Diagnostic[], length: number): DecorationSet {
  const marks = diagnostics.flatMap(({ span }) => {
    if (span === undefined || length === 0) return [];
    const from = Math.min(span[0], length - 1);
    return [Decoration.mark({ class: "cm-fault" }).range(from, Math.min(Math.max(span[1], from + 1), length))];
  });
  return Decoration.set(marks, true);
}

export interface CodeEditor {
  setText(text: string): void;
  /** Underlines the faults; they move with the text until the next call. */
  showFaults(diagnostics: readonly Diagnostic[]): void;
  replace(from: number, to: number, text: string): void;
  focus(): void;
  destroy(): void;
}

/**
 * Puts an editor into `parent`. `labelledBy` and `describedBy` are ids; `nonce` lets its style sheet pass the page's policy.
 * Tab leaves the editor, as from any field.
 */
export function createCodeEditor(options: {
  parent: HTMLElement;
  text: string;
  labelledBy: string;
  describedBy: string;
  nonce: string | null;
  changed: (text: string) => void;
}): CodeEditor {
  const { parent, text, labelledBy, describedBy, nonce, changed } = options;
  const view = new EditorView({
    parent,
    state: EditorState.create({
      doc: text,
      extensions: [
        ...(nonce === null ? [] : [EditorView.cspNonce.of(nonce)]),
        history(),
        drawSelection(),
        bracketMatching({ brackets: "()[]⟨⟩" }),
        EditorView.lineWrapping,
        language,
        syntaxHighlighting(colours),
        look,
        faults,
        keymap.of([...defaultKeymap, ...historyKeymap]),
        EditorView.contentAttributes.of({
          "aria-labelledby": labelledBy,
          "aria-describedby": describedBy,
          spellcheck: "false",
          autocorrect: "off",
          autocapitalize: "off",
        }),
        EditorView.updateListener.of((update) => {
          if (update.docChanged) changed(update.state.doc.toString());
        }),
      ],
    }),
  });
  return {
    setText: (next) => view.dispatch({ changes: { from: 0, to: view.state.doc.length, insert: next } }),
    showFaults: (diagnostics) => view.dispatch({ effects: setFaults.of(diagnostics) }),
    replace(from, to, replacement) {
      const length = view.state.doc.length;
      const start = Math.min(from, length);
      view.dispatch({
        changes: { from: start, to: Math.min(Math.max(to, start), length), insert: replacement },
        selection: { anchor: start + replacement.length },
      });
      view.focus();
    },
    focus: () => view.focus(),
    destroy: () => view.destroy(),
  };
}
