/** Who acts: the first argument of every use case. */
export interface Actor {
	userId: string;
}
