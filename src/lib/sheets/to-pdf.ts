import PDFDocument from 'pdfkit';
import { POINTS_PER_MM, type Fill, type Mark, type Sheet, type Stroke, type TextMark } from './drawing';
import { CAP_HEIGHT_PER_EM, fontRuns, sheetFont } from './font-book';

export interface PdfFacts {
	title: string;
	author: string;
	subject: string;
	/** Stands in the file as its date of making; the same date and sheets give the same bytes. */
	date: Date;
}

/** The sheets as one vector PDF of exact size, with the letters that it uses embedded. */
export async function sheetsToPdf(sheets: Sheet[], facts: PdfFacts): Promise<Buffer> {
	const doc = new PDFDocument({
		autoFirstPage: false,
		// Without this the writer would load a standard face that no sheet uses.
		font: null as unknown as string,
		pdfVersion: '1.7',
		lang: 'en',
		displayTitle: true,
		info: {
			Title: facts.title,
			Author: facts.author,
			Subject: facts.subject,
			Creator: 'Tiltyard',
			Producer: 'Tiltyard',
			CreationDate: facts.date,
			ModDate: facts.date
		}
	});
	const chunks: Buffer[] = [];
	const finished = new Promise<Buffer>((resolve, reject) => {
		doc.on('data', (chunk: Buffer) => chunks.push(chunk));
		doc.on('end', () => resolve(Buffer.concat(chunks)));
		doc.on('error', reject);
	});
	for (const sheet of sheets) {
		doc.addPage({
			size: [sheet.widthMm * POINTS_PER_MM, sheet.heightMm * POINTS_PER_MM],
			margin: 0
		});
		doc.outline.addItem(sheet.name);
		for (const mark of sheet.marks) drawMark(doc, mark);
	}
	doc.end();
	return finished;
}

type Doc = InstanceType<typeof PDFDocument>;
const pt = (mm: number) => mm * POINTS_PER_MM;

function drawMark(doc: Doc, mark: Mark): void {
	switch (mark.kind) {
		case 'path':
			for (const ring of mark.rings) {
				ring.forEach(([x, y], i) => (i ? doc.lineTo(pt(x), pt(y)) : doc.moveTo(pt(x), pt(y))));
				if (mark.closed) doc.closePath();
			}
			paint(doc, mark.stroke, mark.fill);
			return;
		case 'circle':
			doc.circle(pt(mark.centre[0]), pt(mark.centre[1]), pt(mark.radiusMm));
			paint(doc, mark.stroke, mark.fill);
			return;
		case 'text':
			drawText(doc, mark);
			return;
		case 'clip': {
			const { xMm, yMm, widthMm, heightMm } = mark.window;
			doc.save();
			doc.rect(pt(xMm), pt(yMm), pt(widthMm), pt(heightMm)).clip();
			for (const inner of mark.marks) drawMark(doc, inner);
			doc.restore();
			return;
		}
	}
}

function paint(doc: Doc, stroke?: Stroke, fill?: Fill): void {
	if (stroke) {
		doc.lineWidth(pt(stroke.widthMm)).lineJoin('round');
		if (stroke.dashMm) doc.dash(pt(stroke.dashMm[0]), { space: pt(stroke.dashMm[1] ?? stroke.dashMm[0]) });
		else doc.undash();
	}
	doc.fillOpacity(fill?.opacity ?? 1);
	if (stroke && fill) doc.fillAndStroke(fill.colour, stroke.colour, 'even-odd');
	else if (fill) doc.fill(fill.colour, 'even-odd');
	else if (stroke) doc.stroke(stroke.colour);
}

function drawText(doc: Doc, mark: TextMark): void {
	const sizePt = pt(mark.capMm / CAP_HEIGHT_PER_EM);
	const parts = fontRuns(mark.text);
	// Measuring lays the line out once more: only where the place depends on it.
	const measured = mark.anchor !== 'start' || parts.length > 1;
	const runs = parts.map((run) => {
		const name = `manrope-${run.subset}-${mark.weight}`;
		doc.registerFont(name, sheetFont(run.subset, mark.weight).bytes);
		// Tabular figures, so that columns of numbers stand under each other; only the latin file holds them.
		// A line without figures goes without, since the writer keeps such lines' words.
		const features: PDFKit.Mixins.OpenTypeFeatures[] =
			run.subset === 'latin' && /\d/.test(run.text) ? ['tnum'] : [];
		const options = features.length > 0 ? { features } : {};
		const widthPt = measured ? doc.font(name).fontSize(sizePt).widthOfString(run.text, options) : 0;
		return { name, text: run.text, options, widthPt };
	});
	const totalPt = runs.reduce((sum, run) => sum + run.widthPt, 0);
	const share = mark.anchor === 'start' ? 0 : mark.anchor === 'middle' ? 0.5 : 1;
	const [x, y] = [pt(mark.at[0]), pt(mark.at[1])];
	if (mark.turnDeg) doc.save().rotate(mark.turnDeg, { origin: [x, y] });
	doc.fillColor(mark.colour).fillOpacity(mark.opacity ?? 1);
	let at = x - totalPt * share;
	for (const run of runs) {
		doc.font(run.name).fontSize(sizePt);
		doc.text(run.text, at, y, { lineBreak: false, baseline: 'alphabetic', ...run.options });
		at += run.widthPt;
	}
	if (mark.turnDeg) doc.restore();
}
