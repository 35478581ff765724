import {
  type ConstantNode,
  type FunctionNode,
  type MathNode,
  type OperatorNode,
  type ParenthesisNode,
  parse,
  type SymbolNode,
} from "mathjs/number";
import type { ReactNode } from "react";
import { everyDigit, figure } from "./figures.ts";

/** Formulas come as text that a computer reads; here they are set as a person writes them. */

/** Symbols that have a usual form of their own. */
const NAMES: Readonly<Record<string, string>> = {
  plx: "ϖ",
  pi: "π",
  sigma: "σ",
  eps: "ε",
  eta: "η",
  mu: "μ",
  logg: "log g",
  FeH: "[Fe/H]",
  E_BV: "E(B−V)",
  BP_RP: "(BP−RP)",
};

/** `M_Ks` with the part behind the line below it. */
export const MathSymbol = ({ name }: { name: string }) => {
  const whole = NAMES[name];
  if (whole) return whole;
  const [base = name, ...below] = name.split("_");
  const under = below.map((part) => NAMES[part] ?? part).join(" ");
  return (
    <span className="whitespace-nowrap">
      {NAMES[base] ?? base}
      {under === "" ? null : <sub className="text-[0.75em] leading-none">{under}</sub>}
    </span>
  );
};

const OPERATORS: Readonly<Record<string, string>> = { "*": " · ", "/": " / ", "+": " + ", "-": " − " };
const BRACKETS: Readonly<Record<string, readonly [string, string]>> = {
  sqrt: ["√(", ")"],
  abs: ["|", "|"],
  floor: ["⌊", "⌋"],
  log10: ["log₁₀(", ")"],
  asin: ["arcsin(", ")"],
  acos: ["arccos(", ")"],
};

type Spell = (value: number) => string;

/** What stands raised needs no brackets round it. */
const bare = (node: MathNode): MathNode =>
  node.type === "ParenthesisNode" ? (node as ParenthesisNode).content : node;

const setOperator = ({ op, args }: OperatorNode, spell: Spell): ReactNode => {
  const [left, right] = args;
  if (!left) return op;
  if (!right) return ["−", set(left, spell)];
  if (op === "^")
    return (
      <span className="whitespace-nowrap">
        {set(left, spell)}
        <sup className="text-[0.75em] leading-none">{set(bare(right), spell)}</sup>
      </span>
    );
  return (
    <>
      {set(left, spell)}
      {OPERATORS[op] ?? ` ${op} `}
      {set(right, spell)}
    </>
  );
};

const setFunction = ({ fn, args }: FunctionNode, spell: Spell): ReactNode => {
  const name = (fn as unknown as SymbolNode).name;
  const [before, after] = BRACKETS[name] ?? [`${name}(`, ")"];
  return (
    <>
      {before}
      {args.map((arg, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the places of a function stay as they are
        <span key={i}>
          {i === 0 ? "" : ", "}
          {set(arg, spell)}
        </span>
      ))}
      {after}
    </>
  );
};

const set = (node: MathNode, spell: Spell): ReactNode => {
  if (node.type === "ConstantNode") return spell(Number((node as ConstantNode).value));
  if (node.type === "SymbolNode") return <MathSymbol name={(node as SymbolNode).name} />;
  if (node.type === "ParenthesisNode") return <>({set((node as ParenthesisNode).content, spell)})</>;
  if (node.type === "OperatorNode") return setOperator(node as OperatorNode, spell);
  if (node.type === "FunctionNode") return setFunction(node as FunctionNode, spell);
  return node.toString();
};

interface Props {
  /** As the workings have it. */
  text: string;
  /** With the numbers put in: they are shown to seven digits. */
  isSum?: boolean;
}

/** A formula in the figures' face; a screen reader hears the plain text. */
export const Formula = ({ text, isSum = false }: Props) => (
  <span role="math" aria-label={text} title={isSum ? text : undefined}>
    <span aria-hidden="true">{set(parse(text), isSum ? figure : everyDigit)}</span>
  </span>
);
