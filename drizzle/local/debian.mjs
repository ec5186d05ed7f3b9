/** Programs from Debian's packages: found, or installed where that is allowed. */
import { accessSync, constants, existsSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { postgresBinaries } from './cluster.mjs';
import { Halt, must } from './run.mjs';

/** @param {string} name */
function onPath(name) {
	return (process.env.PATH ?? '').split(delimiter).some((folder) => {
		try {
			accessSync(join(folder, name), constants.X_OK);
			return true;
		} catch {
			return false; // not in this folder: the search goes on
		}
	});
}

/** @param {string} name */
const jar = (name) => () => existsSync(`/usr/share/java/${name}.jar`);
/** @param {string} name */
const program = (name) => () => onPath(name);

/** @typedef {Readonly<Record<string, () => boolean>>} Packages package → whether what it brings is there */

/** @type {Packages} */
export const toServe = { postgresql: () => postgresBinaries() !== null };

/** @type {Packages} */
export const toTest = {
	...toServe,
	chromium: program('chromium'),
	ngspice: program('ngspice'),
	'default-jre-headless': program('java'),
	'libpdfbox2-java': jar('preflight'),
	'libfontbox2-java': jar('fontbox2'),
	'libcommons-logging-java': jar('commons-logging'),
	'libactivation-java': () => jar('javax.activation')() || jar('jakarta.activation')() || jar('activation')(),
	'libjaxb-api-java': jar('jaxb-api'),
	qpdf: program('qpdf'),
	'poppler-utils': program('pdftotext'),
	'librsvg2-bin': program('rsvg-convert'),
	'mupdf-tools': program('mutool'),
	ghostscript: program('gs'),
	'zbar-tools': program('zbarimg'),
	'python3-scikit-rf': () => existsSync('/usr/lib/python3/dist-packages/skrf')
};

/** @param {Packages} packages */
const missingOf = (packages) => Object.keys(packages).filter((name) => !packages[name]?.());

/**
 * Does something while Debian makes no server of its own: it would start one on the usual port, and ours
 * has its own data and port. The setting is taken back, for whoever installs another version later.
 *
 * @param {() => Promise<unknown>} work
 */
async function withoutMainCluster(work) {
	const folder = '/etc/postgresql-common/createcluster.d';
	const file = join(folder, 'herringbone.conf');
	mkdirSync(folder, { recursive: true });
	writeFileSync(file, 'create_main_cluster = false\n');
	try {
		await work();
	} finally {
		rmSync(file, { force: true });
	}
}

/**
 * Makes sure that the packages' programs are there.
 *
 * @param {Packages} packages
 * @throws {Halt} naming what is missing, where it cannot be installed from here
 */
export async function ensurePackages(packages) {
	const missing = missingOf(packages);
	if (missing.length === 0) return;
	const names = missing.join(' ');
	if (process.getuid?.() !== 0 || !onPath('apt-get')) {
		throw new Halt(`Missing: ${names}. Install with: sudo apt-get install ${names}`);
	}
	console.log(`Installing ${names} …`);
	const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
	await must('read the list of packages', 'apt-get', ['update', '-qq'], { env });
	const install = ['install', '-y', '-qq', '--no-install-recommends', ...missing];
	await withoutMainCluster(() => must(`install ${names}`, 'apt-get', install, { env }));
	const still = missingOf(packages);
	if (still.length > 0) throw new Halt(`Installed, but still not found: ${still.join(' ')}.`);
}
