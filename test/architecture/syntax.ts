import { parseSync } from 'vite';

/** A node of the syntax tree, as the parser of the build tool gives it (ESTree with types). */
export interface Node {
  readonly type: string;
  readonly start: number;
  readonly [field: string]: unknown;
}

const isNode = (value: unknown): value is Node =>
  typeof value === 'object' && value !== null && typeof (value as Node).type === 'string';

/** Parses one file; a syntax error is thrown, with the path. */
export function parse(path: string, text: string): Node {
  const { program, errors } = parseSync(path, text);
  if (errors.length > 0) throw new Error(`${path}: ${errors[0].message}`);
  return program as unknown as Node;
}

/** Calls `visit` on every node below and including this one; `visit` returns false to stay out of its children. */
export function walk(
  node: Node,
  visit: (node: Node, parent: Node | null) => unknown,
  parent: Node | null = null,
): void {
  if (visit(node, parent) === false) return;
  for (const key in node) {
    const value = node[key];
    if (Array.isArray(value)) {
      for (const item of value) if (isNode(item)) walk(item, visit, node);
    } else if (isNode(value)) walk(value, visit, node);
  }
}

/** Line of an offset, from 1. */
export function lineAt(text: string, offset: number): number {
  let line = 1;
  for (let k = text.indexOf('\n'); k >= 0 && k < offset; k = text.indexOf('\n', k + 1)) line++;
  return line;
}

/** Names that a pattern binds. */
function bind(pattern: unknown, names: Set<string>): void {
  if (!isNode(pattern)) return;
  if (pattern.type === 'Identifier') names.add(pattern.name as string);
  else if (pattern.type === 'AssignmentPattern') bind(pattern.left, names);
  else if (pattern.type === 'RestElement') bind(pattern.argument, names);
  else if (pattern.type === 'ArrayPattern')
    for (const item of pattern.elements as unknown[]) bind(item, names);
  else if (pattern.type === 'ObjectPattern') {
    for (const item of pattern.properties as Node[])
      bind(item.type === 'RestElement' ? item : item.value, names);
  }
}

/** Every name that the file declares somewhere: coarser than scopes, and enough to tell a local from a global. */
function declaredNames(program: Node): Set<string> {
  const names = new Set<string>();
  walk(program, (node) => {
    if (Array.isArray(node.params)) for (const param of node.params) bind(param, names);
    if (node.type === 'VariableDeclarator') bind(node.id, names);
    else if (node.type === 'CatchClause') bind(node.param, names);
    else if (/^(Function|Class|TSInterface|TSTypeAlias)/.test(node.type)) bind(node.id, names);
    else if (/^Import.*Specifier$/.test(node.type)) bind(node.local, names);
  });
  return names;
}

/** Whether an identifier in this place is the name of a member and refers to nothing. */
function isMemberName(node: Node, parent: Node): boolean {
  if (parent.type === 'MemberExpression') return parent.property === node && parent.computed === false;
  if (parent.type === 'Property') {
    return parent.key === node && parent.computed === false && parent.shorthand === false;
  }
  if (
    /^(MethodDefinition|PropertyDefinition|AccessorProperty|TSPropertySignature|TSMethodSignature)$/.test(
      parent.type,
    )
  ) {
    return parent.key === node && parent.computed === false;
  }
  if (/Specifier$/.test(parent.type)) return true;
  return (
    parent.type === 'LabeledStatement' ||
    parent.type === 'TSQualifiedName' ||
    parent.type === 'TSTypeParameter'
  );
}

/** Where the file refers, in values or types, to names that it declares nowhere. */
export function globalReferences(program: Node): { name: string; node: Node; parent: Node }[] {
  const declared = declaredNames(program);
  const found: { name: string; node: Node; parent: Node }[] = [];
  walk(program, (node, parent) => {
    if (node.type !== 'Identifier' || parent === null) return;
    const name = node.name as string;
    if (!declared.has(name) && !isMemberName(node, parent)) found.push({ name, node, parent });
  });
  return found;
}
