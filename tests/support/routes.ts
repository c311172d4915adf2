import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import ts from 'typescript';

const METHODS = /^(GET|POST|PUT|PATCH|DELETE)$/;

/**
 * Everything that answers a request, read from the route files: `page /about`, `action /account?/name` (`action /reset` for a default
 * one), `GET /api/v1/me`.
 */
export function routesOf(folder: string): string[] {
	return readdirSync(folder, { recursive: true, encoding: 'utf8' })
		.flatMap((file) => {
			const route = `/${path
				.dirname(file)
				.split(path.sep)
				.filter((part) => part !== '.' && !part.startsWith('('))
				.join('/')}`;
			const name = path.basename(file);
			if (name === '+page.svelte') return [`page ${route}`];
			if (!/^\+(page\.server|server)\.(js|ts)$/.test(name)) return [];
			const exported = exportsOf(path.join(folder, file));
			if (name.startsWith('+server'))
				return [...exported.keys()].filter((one) => METHODS.test(one)).map((method) => `${method} ${route}`);
			// A page without markup of its own only leads on.
			const leads = exported.has('load') && !existing(folder, file) ? [`page ${route}`] : [];
			return [...leads, ...actionNames(exported.get('actions')).map((action) => `action ${route}${action}`)];
		})
		.sort();
}

const existing = (folder: string, file: string) =>
	readdirSync(path.join(folder, path.dirname(file))).includes('+page.svelte');

/** Names a module exports, with what they are set to. */
function exportsOf(file: string): Map<string, ts.Expression | undefined> {
	const source = ts.createSourceFile(file, readFileSync(file, 'utf8'), ts.ScriptTarget.Latest);
	const found = new Map<string, ts.Expression | undefined>();
	for (const statement of source.statements) {
		if (ts.isExportDeclaration(statement))
			throw new Error(
				`${file} exports by a list; the wall's test reads only "export const" and "export function".`
			);
		const modifiers = ts.canHaveModifiers(statement) ? (ts.getModifiers(statement) ?? []) : [];
		if (!modifiers.some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword)) continue;
		if (ts.isVariableStatement(statement))
			for (const { name, initializer } of statement.declarationList.declarations)
				found.set((name as ts.Identifier).text, initializer);
		if (ts.isFunctionDeclaration(statement) && statement.name) found.set(statement.name.text, undefined);
	}
	return found;
}

function actionNames(expression: ts.Expression | undefined): string[] {
	if (!expression) return [];
	const object = ts.isSatisfiesExpression(expression) ? expression.expression : expression;
	if (!ts.isObjectLiteralExpression(object))
		throw new Error("The wall's test reads actions only from an object that is written out.");
	return object.properties.map((property) => {
		const name = property.name && ts.isIdentifier(property.name) ? property.name.text : null;
		if (name === null) throw new Error('An action has a name that cannot be read.');
		return name === 'default' ? '' : `?/${name}`;
	});
}
