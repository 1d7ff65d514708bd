/** Buckets of a plan by square cells, so that near things are found without asking everything. */
export class CellIndex {
	private readonly cells = new Map<string, number[]>();

	constructor(private readonly sizeM: number) {}

	private cell(value: number): number {
		return Math.floor(value / this.sizeM);
	}

	addBox(index: number, west: number, south: number, east: number, north: number): void {
		for (let x = this.cell(west); x <= this.cell(east); x++) {
			for (let y = this.cell(south); y <= this.cell(north); y++) {
				const key = `${x} ${y}`;
				const list = this.cells.get(key);
				if (list) list.push(index);
				else this.cells.set(key, [index]);
			}
		}
	}

	at(x: number, y: number): readonly number[] {
		return this.cells.get(`${this.cell(x)} ${this.cell(y)}`) ?? [];
	}
}
