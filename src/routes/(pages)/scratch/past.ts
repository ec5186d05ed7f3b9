/** Undo and redo over whole states; changes that follow one another at one place count as one. */
export interface Past<State> {
	readonly before: readonly State[];
	readonly now: State;
	readonly after: readonly State[];
	/** Where the last change was made; null once it is closed. */
	readonly place: string | null;
}

const LONGEST = 200;

export function beginning<State>(now: State): Past<State> {
	return { before: [], now, after: [], place: null };
}

/** Takes a new state. With the place of the last change still open, the two are one step of undo. */
export function step<State>(past: Past<State>, now: State, place: string | null = null): Past<State> {
	if (now === past.now) return past;
	if (place !== null && place === past.place) return { ...past, now, after: [] };
	return { before: [...past.before, past.now].slice(-LONGEST), now, after: [], place };
}

/** The next change is a step of its own, wherever it is made. */
export function close<State>(past: Past<State>): Past<State> {
	return past.place === null ? past : { ...past, place: null };
}

export function undo<State>(past: Past<State>): Past<State> {
	const now = past.before.at(-1);
	if (now === undefined) return past;
	return { before: past.before.slice(0, -1), now, after: [past.now, ...past.after], place: null };
}

export function redo<State>(past: Past<State>): Past<State> {
	const [now, ...after] = past.after;
	if (now === undefined) return past;
	return { before: [...past.before, past.now], now, after, place: null };
}
