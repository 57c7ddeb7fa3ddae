// Takes out of the compiler's text what its parser only does for the checker, the emitter and error lists: a tenth of the
// time that an editor waits for its first findings, and a quarter of what the trees of its files weigh. It changes text,
// not trees: kinds, positions, flags and children stay what the whole compiler gives. Each change says what it looks for,
// so that a compiler of another shape ends the build.

/** Fields that the binder and the checker fill in, emptied on every node beforehand. */
const LATER_FIELDS =
  /^ +node\.(?:symbol|localSymbol|locals|nextContainer|flowNode|endFlowNode|returnFlowNode|jsDoc|typeArguments) = void 0;\n/gm;

/** Which language features a node holds, for the emitter. */
const FEATURES = /^ +(?:if \(.*\) )?(?:node|array)\.transformFlags (?:\||&)?= .*;\n/gm;
const FEATURES_OF_LIST = /^ +if \(elements\.transformFlags === void 0\) \{\n.*\n +\}\n|^ +aggregateChildrenFlags\(array\);\n/gm;

/** The parser's one question about features: which statements are there to parse again, because they wait (`await`)? */
const WAITS_IN_FILE = "sourceFile.transformFlags & 67108864 /* ContainsPossibleTopLevelAwait */";
const WAITS_IN_NODE = "!!(node.transformFlags & 67108864 /* ContainsPossibleTopLevelAwait */)";

/** The same answer, worked out for the few files that have an `await` outside of what is known to wait. */
const WAITS = `
function waits(node) {
  const { EnumDeclaration, ModuleDeclaration, NamespaceExportDeclaration, ExternalModuleReference, JsxAttribute } = SyntaxKind;
  const { kind } = node;
  if (isIdentifier(node)) return node.escapedText === "await";
  if (kind === EnumDeclaration || kind === ModuleDeclaration) return false;
  if (kind >= NamespaceExportDeclaration && kind <= ExternalModuleReference) return false;
  const holds = (child) => {
    const isName = (child === node.name && kind !== JsxAttribute) || child === node.propertyName;
    if (isName && isIdentifier(child)) return false;
    if (child === node.body && isFunctionLike(node)) return false;
    return (getTransformFlagsSubtreeExclusions(child.kind) & 67108864) === 0 && waits(child);
  };
  return forEachChild(node, holds) ?? false;
}
`;

const ALL_MESSAGES = /^var Diagnostics = \{([\s\S]*?)\n\};$/m;

/**
 * @param {string} compiler
 * @returns {string}
 */
export function slimParser(compiler) {
  let slim = compiler;
  /** @type {(from: RegExp | string, to: string) => void} */
  const change = (from, to) => {
    const before = slim;
    slim = slim.replaceAll(from, to);
    if (slim === before)
      throw new Error(`TypeScript's compiler file no longer holds ${from}: slimParser.mjs must learn its new shape.`);
  };
  change(LATER_FIELDS, "");
  change(FEATURES, "");
  change(FEATURES_OF_LIST, "");
  change(WAITS_IN_FILE, 'identifiers.has("await") && sourceFile.statements.some(waits)');
  change(WAITS_IN_NODE, "waits(node)");
  return separateMessages(slim) + WAITS;
}

/**
 * A constant for each message instead of one object with all of them, so that the bundler can leave out three quarters.
 * @param {string} compiler
 */
function separateMessages(compiler) {
  const [whole, entries] = ALL_MESSAGES.exec(compiler) ?? [];
  if (whole === undefined || entries === undefined)
    throw new Error("TypeScript's messages are no longer in one object: slimParser.mjs must learn where.");
  const separate = `,${entries}`.replace(/,\n {2}(\w+): diag\(/g, ";\nvar Diagnostics_$1 = /* @__PURE__ */ diag(");
  return compiler.replace(whole, () => `${separate};`).replace(/\bDiagnostics\.(?=\w)/g, "Diagnostics_");
}
