/**
 * Expressions of temperature, time or depth: "45 - 0.02*T", "20 + 5*sin(2*pi*t/86400)".
 *
 * mathjs parses the text; the tree is then walked against a short list of what is allowed and made into closures over
 * plain numbers. Nothing a person types is ever evaluated by mathjs itself.
 */
import { create, parseDependencies, type MathNode } from 'mathjs/number';
import { CONSTANTS, FUNCTIONS } from './functions';

/** A function of the variables, in the order in which they were named. */
export type Compiled = (values: ArrayLike<number>) => number;

export type ReadExpression =
  { kind: 'expression'; evaluate: Compiled; uses: ReadonlySet<string> } | { kind: 'refused'; message: string };

const MOST_NODES = 200;
const MOST_DEPTH = 40;

/** Made when the first expression is met: most plans have none. */
let parser: ((text: string) => MathNode) | null = null;
function parse(text: string): MathNode {
  parser ??= create({ parseDependencies }).parse as (text: string) => MathNode;
  return parser(text);
}

class Refusal extends Error {}

/** Reads an expression in `variables`; says in plain words what keeps it from being one. */
export function readExpression(text: string, variables: readonly string[]): ReadExpression {
  if (text.trim() === '') return { kind: 'refused', message: 'must not be empty' };
  let tree: MathNode;
  try {
    tree = parse(text);
  } catch {
    return { kind: 'refused', message: `cannot be read as an expression of ${listed(variables)}` };
  }
  const walk: Walk = { variables, uses: new Set(), nodes: 0 };
  try {
    return { kind: 'expression', evaluate: compile(tree, walk, 0), uses: walk.uses };
  } catch (error) {
    if (error instanceof Refusal) return { kind: 'refused', message: error.message };
    throw error;
  }
}

interface Walk {
  variables: readonly string[];
  uses: Set<string>;
  nodes: number;
}

/** The parts of mathjs's nodes that are looked at. */
type Tree = MathNode & {
  value?: unknown;
  name?: string;
  op?: string;
  fn?: { name?: string };
  args?: MathNode[];
  content?: MathNode;
};

function compile(node: MathNode, walk: Walk, depth: number): Compiled {
  if (++walk.nodes > MOST_NODES || depth > MOST_DEPTH) throw new Refusal('is too long to be read as an expression');
  const tree = node as Tree;
  switch (tree.type) {
    case 'ConstantNode':
      return constant(tree.value);
    case 'ParenthesisNode':
      return compile(tree.content as MathNode, walk, depth + 1);
    case 'SymbolNode':
      return symbol(tree.name ?? '', walk);
    case 'OperatorNode':
      return operator(tree.op ?? '', operands(tree, walk, depth));
    case 'FunctionNode':
      return call(tree.fn?.name ?? '', operands(tree, walk, depth));
    default:
      throw new Refusal('may hold numbers, + − * / ^, brackets and functions only');
  }
}

const operands = (tree: Tree, walk: Walk, depth: number): Compiled[] =>
  (tree.args ?? []).map((argument) => compile(argument, walk, depth + 1));

function constant(value: unknown): Compiled {
  if (typeof value !== 'number' || !Number.isFinite(value)) throw new Refusal('may hold finite numbers only');
  return () => value;
}

function symbol(name: string, walk: Walk): Compiled {
  const index = walk.variables.indexOf(name);
  if (index >= 0) {
    walk.uses.add(name);
    return (values) => values[index];
  }
  if (Object.hasOwn(CONSTANTS, name)) return constant(CONSTANTS[name]);
  throw new Refusal(`does not know "${name}"; it may use ${listed([...walk.variables, ...Object.keys(CONSTANTS)])}`);
}

function operator(op: string, args: Compiled[]): Compiled {
  const [a, b] = args;
  if (args.length === 1 && op === '-') return (values) => -a(values);
  if (args.length === 1 && op === '+') return a;
  if (args.length === 2) {
    switch (op) {
      case '+':
        return (values) => a(values) + b(values);
      case '-':
        return (values) => a(values) - b(values);
      case '*':
        return (values) => a(values) * b(values);
      case '/':
        return (values) => a(values) / b(values);
      case '^':
        return (values) => a(values) ** b(values);
    }
  }
  throw new Refusal(`does not know the sign "${op}"`);
}

function call(name: string, args: Compiled[]): Compiled {
  if (!Object.hasOwn(FUNCTIONS, name)) {
    throw new Refusal(`does not know the function "${name}"; it may use ${listed(Object.keys(FUNCTIONS))}`);
  }
  const {
    arguments: [least, most],
    apply,
  } = FUNCTIONS[name];
  if (args.length < least || args.length > most) {
    throw new Refusal(`gives ${name} ${args.length} numbers; it takes ${least === most ? least : `${least} to ${most}`}`);
  }
  if (args.length === 1) {
    const [a] = args;
    return (values) => apply(a(values));
  }
  return (values) => apply(...args.map((argument) => argument(values)));
}

const listed = (names: readonly string[]): string =>
  names.length < 2 ? (names[0] ?? 'numbers') : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
