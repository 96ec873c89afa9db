/** References in formulas, as far as finding circles and spills needs them. */
import { columnNumber, parseAddress } from "../address";

export interface Area {
  readonly sheet: string;
  readonly top: number;
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
}

const MOST_ROWS = 1_048_576;
const MOST_COLUMNS = 16_384;

const REFERENCE =
  /(?:(?:'((?:[^']|'')+)'|([A-Za-z_][\w.]*))!)?(?:(\$?[A-Z]{1,3}\$?\d+)(?::(\$?[A-Z]{1,3}\$?\d+))?|\$?([A-Z]{1,3}):\$?([A-Z]{1,3}))(?![\w(.])/g;

/** Areas that a formula refers to; names are looked up among the workbook's single-area names. */
export function areasOf(formula: string, ownSheet: string, names: ReadonlyMap<string, Area>): Area[] {
  const bare = formula.replace(/"(?:[^"]|"")*"/g, '""');
  const areas: Area[] = [];
  for (const [, quoted, plain, first, last, firstColumn, lastColumn] of bare.matchAll(REFERENCE)) {
    const sheet = quoted?.replace(/''/g, "'") ?? plain ?? ownSheet;
    if (firstColumn !== undefined && lastColumn !== undefined) {
      areas.push({
        sheet,
        top: 1,
        bottom: MOST_ROWS,
        left: columnNumber(firstColumn),
        right: columnNumber(lastColumn),
      });
      continue;
    }
    const from = parseAddress(first!);
    const to = parseAddress(last ?? first!);
    if (!from || !to || from.column > MOST_COLUMNS) continue;
    areas.push({
      sheet,
      top: Math.min(from.row, to.row),
      bottom: Math.max(from.row, to.row),
      left: Math.min(from.column, to.column),
      right: Math.max(from.column, to.column),
    });
  }
  for (const word of bare.match(/[A-Za-z_][\w.]*/g) ?? []) {
    const named = names.get(word.toLowerCase());
    if (named) areas.push(named);
  }
  return areas;
}

/** A formula's place with the area that its answer fills. */
export interface FormulaNode extends Area {
  readonly formula: string;
}

/**
 * Formulas that depend on themselves, directly or through others; the engine would answer them with numbers.
 *
 * @returns addresses of one circle, or an empty list
 */
export function findCircle(nodes: readonly FormulaNode[], names: ReadonlyMap<string, Area>): FormulaNode[] {
  const bySheet = new Map<string, FormulaNode[]>();
  for (const node of nodes) {
    const key = node.sheet.toLowerCase();
    const list = bySheet.get(key);
    if (list) list.push(node);
    else bySheet.set(key, [node]);
  }
  const inputsOf = (node: FormulaNode): FormulaNode[] =>
    areasOf(node.formula, node.sheet, names).flatMap((area) =>
      (bySheet.get(area.sheet.toLowerCase()) ?? []).filter(
        (other) =>
          other.top <= area.bottom && other.bottom >= area.top && other.left <= area.right && other.right >= area.left,
      ),
    );
  const done = new Set<FormulaNode>();
  for (const start of nodes) {
    if (done.has(start)) continue;
    // Depth first without recursion: chains of running sums are as deep as a column.
    const path: { node: FormulaNode; inputs: FormulaNode[]; next: number }[] = [
      { node: start, inputs: inputsOf(start), next: 0 },
    ];
    const onPath = new Set([start]);
    while (path.length > 0) {
      const top = path[path.length - 1]!;
      const input = top.inputs[top.next++];
      if (!input) {
        done.add(top.node);
        onPath.delete(top.node);
        path.pop();
      } else if (onPath.has(input)) {
        return path.slice(path.findIndex(({ node }) => node === input)).map(({ node }) => node);
      } else if (!done.has(input)) {
        onPath.add(input);
        path.push({ node: input, inputs: inputsOf(input), next: 0 });
      }
    }
  }
  return [];
}
