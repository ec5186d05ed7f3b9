/** Reads route modules as syntax: which handlers they have, and what each does first. */
import ts from 'typescript';

export interface Handler {
	readonly name: string;
	/** The function called by its first statement, or null. */
	readonly first: string | null;
}

const methods = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS', 'fallback', 'load']);

type Body = ts.ArrowFunction | ts.FunctionExpression | ts.FunctionDeclaration | ts.MethodDeclaration;

function isFunction(node: ts.Node | undefined): node is Body {
	return (
		!!node &&
		(ts.isArrowFunction(node) ||
			ts.isFunctionExpression(node) ||
			ts.isFunctionDeclaration(node) ||
			ts.isMethodDeclaration(node))
	);
}

/** `guard(…)`, `await guard(…)`, `const x = guard(…)` and `const x = await guard(…)` all call it. */
function calledBy(statement: ts.Statement | undefined): string | null {
	if (!statement) return null;
	let expression: ts.Expression | undefined;
	if (ts.isExpressionStatement(statement)) expression = statement.expression;
	if (ts.isVariableStatement(statement)) {
		const [declaration] = statement.declarationList.declarations;
		expression = declaration?.initializer;
	}
	if (expression && ts.isAwaitExpression(expression)) expression = expression.expression;
	if (!expression || !ts.isCallExpression(expression)) return null;
	return ts.isIdentifier(expression.expression) ? expression.expression.text : null;
}

function unwrap(node: ts.Expression | undefined): ts.Expression | undefined {
	let inner = node;
	while (
		inner &&
		(ts.isSatisfiesExpression(inner) || ts.isAsExpression(inner) || ts.isParenthesizedExpression(inner))
	) {
		inner = inner.expression;
	}
	return inner;
}

function handler(name: string, value: ts.Node | undefined): Handler {
	if (!isFunction(value) || !value.body || !ts.isBlock(value.body)) return { name, first: null };
	return { name, first: calledBy(value.body.statements[0]) };
}

function actionsOf(value: ts.Expression | undefined): Handler[] {
	if (!value || !ts.isObjectLiteralExpression(value)) return [{ name: 'actions', first: null }];
	return value.properties.map((property) => {
		const name = `actions.${property.name?.getText() ?? '?'}`;
		return handler(name, ts.isPropertyAssignment(property) ? unwrap(property.initializer) : property);
	});
}

const isExported = (statement: ts.Statement) =>
	ts.canHaveModifiers(statement) &&
	!!ts.getModifiers(statement)?.some((modifier) => modifier.kind === ts.SyntaxKind.ExportKeyword);

const isHandler = (name: string) => methods.has(name) || name === 'actions';

function ofVariable({ name, initializer }: ts.VariableDeclaration): Handler[] {
	const value = unwrap(initializer);
	return name.getText() === 'actions' ? actionsOf(value) : [handler(name.getText(), value)];
}

function ofStatement(statement: ts.Statement): Handler[] {
	if (ts.isExportDeclaration(statement)) {
		const clause = statement.exportClause;
		const names = clause && ts.isNamedExports(clause) ? clause.elements.map(({ name }) => name.text) : [];
		return names.map((name) => ({ name, first: null }));
	}
	if (!isExported(statement)) return [];
	if (ts.isFunctionDeclaration(statement)) return [handler(statement.name?.text ?? '', statement)];
	return ts.isVariableStatement(statement) ? statement.declarationList.declarations.flatMap(ofVariable) : [];
}

/** The handlers that a route module exports; one exported in a way that is not read here has no first call. */
export function handlersOf(text: string): Handler[] {
	const source = ts.createSourceFile('route.ts', text, ts.ScriptTarget.Latest, true);
	return source.statements.flatMap(ofStatement).filter(({ name }) => isHandler(name.split('.')[0] ?? ''));
}

/** The exported functions that have no docstring just before them. */
export function withoutDocstring(text: string): string[] {
	const source = ts.createSourceFile('module.ts', text, ts.ScriptTarget.Latest, true);
	return source.statements
		.filter((statement) => isExported(statement) && ts.isFunctionDeclaration(statement))
		.filter((statement) => ts.getJSDocCommentsAndTags(statement).length === 0)
		.map((statement) => (statement as ts.FunctionDeclaration).name?.text ?? '?');
}
