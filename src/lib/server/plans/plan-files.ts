import { createHash } from 'node:crypto';
import { writeGeoJson } from '$lib/exchange/geojson-writer';
import { writePegCsv } from '$lib/exchange/peg-csv';
import { planSheets, sheetsToPdf, type PlanContent } from '$lib/sheets';

export interface MadeFile {
	name: string;
	mediaType: string;
	bytes: Buffer;
	sha256: string;
}

/** The files of an issued plan. The same content gives the same bytes, whenever and wherever they are made. */
export async function makePlanFiles(content: PlanContent): Promise<MadeFile[]> {
	const { heading, place, plot, rows } = content;
	if (!heading.issued) throw new TypeError('Files are made of issued plans only.');
	const date = new Date(heading.issued.timeMs);
	const pdf = await sheetsToPdf(planSheets(content), {
		title: `${heading.project}, plan revision ${heading.revision}`,
		author: heading.issued.by,
		subject: `${heading.documentNumber}, ${heading.layoutName}, layout revision ${heading.layoutRevision}`,
		date
	});
	const geoJson = writeGeoJson(place, plot, rows, {
		project: heading.project,
		layout: heading.layoutName,
		layoutRevision: heading.layoutRevision,
		revision: heading.revision,
		issuedAt: date.toISOString()
	});
	const stem = `${fileStem(heading.project)}-${heading.revision}`;
	return [
		madeFile(`${stem}-plan.pdf`, 'application/pdf', pdf),
		madeFile(`${stem}-pegs.csv`, 'text/csv; charset=utf-8', Buffer.from(writePegCsv(rows), 'utf8')),
		madeFile(`${stem}-field.geojson`, 'application/geo+json', Buffer.from(geoJson, 'utf8'))
	];
}

function madeFile(name: string, mediaType: string, bytes: Buffer): MadeFile {
	return { name, mediaType, bytes, sha256: sha256(bytes) };
}

export function sha256(data: Buffer | string): string {
	return createHash('sha256').update(data).digest('hex');
}

/** A name that every file system takes: Latin letters, digits and hyphens. */
export function fileStem(name: string): string {
	const plain = name
		.normalize('NFKD')
		.replace(/[\u0300-\u036f]/g, '')
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '-')
		.slice(0, 40)
		.replace(/^-+|-+$/g, '');
	return plain || 'tiltyard';
}
