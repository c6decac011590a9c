import ts from 'typescript';

/** A load, action or endpoint method, as it stands in a route file. */
export interface Entry {
	/** As the access table names it. */
	readonly name: string;
	readonly kind: 'load' | 'layout' | 'action' | 'endpoint';
	/** The folder below `src/routes`, with its groups, as `/(app)/products`. */
	readonly folder: string;
	/** The address, without groups: `/products/[partNumber]`. */
	readonly route: string;
	/** The action or the method; empty for a load. */
	readonly member: string;
}

const METHODS = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS', 'fallback']);

/** The route files with their text, by path from the root of the repository. */
export const routeFiles = import.meta.glob<string>('/src/routes/**/+*.ts', {
	query: '?raw',
	import: 'default',
	eager: true
});

/** Every file that Kit reads as a part of a route. */
export const routeParts = Object.keys(import.meta.glob('/src/routes/**/+*.{ts,svelte}'));

/** The addresses of a folder of routes: groups are no part of them. */
export const routeOf = (folder: string): string => folder.replace(/\/\([^)]*\)/g, '') || '/';

/** What one route file lets the world call. */
export function entriesIn(file: string, text: string): Entry[] {
	const [, folder = '', name = ''] = /^\/src\/routes(.*)\/(\+[^/]+)\.ts$/.exec(file) ?? [];
	const route = routeOf(folder);
	const exported = exportsOf(file, text);
	const entry = (kind: Entry['kind'], said: string, member = ''): Entry => ({
		name: said,
		kind,
		folder,
		route,
		member
	});

	switch (name) {
		case '+server':
			return [...exported.keys()]
				.filter((member) => METHODS.has(member))
				.map((member) => entry('endpoint', `${route} ${member}`, member));
		case '+layout.server':
			return exported.has('load') ? [entry('layout', `${folder || '/'} layout load`)] : [];
		case '+page.server':
			return [
				...(exported.has('load') ? [entry('load', `${route} load`)] : []),
				...actionNames(file, exported.get('actions')).map((member) =>
					entry('action', `${route} action ${member}`, member)
				)
			];
		default:
			return [];
	}
}

/** Every entry of the application, in the order of the files. */
export function allEntries(): Entry[] {
	return Object.entries(routeFiles)
		.toSorted(([first], [second]) => first.localeCompare(second))
		.flatMap(([file, text]) => entriesIn(file, text));
}

/** What a module exports, by name, with the expression where there is one. */
function exportsOf(file: string, text: string): Map<string, ts.Expression | undefined> {
	const source = ts.createSourceFile(file, text, ts.ScriptTarget.ESNext, true);
	const found = new Map<string, ts.Expression | undefined>();
	for (const statement of source.statements) {
		if (ts.isExportDeclaration(statement) && statement.exportClause) {
			if (!ts.isNamedExports(statement.exportClause)) throw unreadable(file, 'export *');
			for (const { name } of statement.exportClause.elements) found.set(name.text, undefined);
		}
		if (!isExported(statement)) continue;
		if (ts.isFunctionDeclaration(statement) && statement.name)
			found.set(statement.name.text, undefined);
		if (ts.isVariableStatement(statement)) {
			for (const { name, initializer } of statement.declarationList.declarations)
				if (ts.isIdentifier(name)) found.set(name.text, initializer);
		}
	}
	return found;
}

const isExported = (statement: ts.Statement): boolean =>
	ts.canHaveModifiers(statement) &&
	(ts.getModifiers(statement) ?? []).some(({ kind }) => kind === ts.SyntaxKind.ExportKeyword);

/** The names of the actions; an object that can't be read name by name is refused. */
function actionNames(file: string, actions: ts.Expression | undefined): string[] {
	if (actions === undefined) return [];
	const object = ts.isSatisfiesExpression(actions) ? actions.expression : actions;
	if (!ts.isObjectLiteralExpression(object)) throw unreadable(file, 'actions');
	return object.properties.map(({ name }) => {
		if (name === undefined || !(ts.isIdentifier(name) || ts.isStringLiteral(name)))
			throw unreadable(file, 'actions');
		return name.text;
	});
}

const unreadable = (file: string, what: string) =>
	new Error(`${file}: ${what} can't be enumerated; write its names out`);
