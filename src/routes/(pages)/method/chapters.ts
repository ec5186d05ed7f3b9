/** What the method page says besides the rules themselves. */

export interface Chapter {
	readonly id: string;
	readonly title: string;
	readonly paragraphs: readonly string[];
	/** Said apart: where the words come from, and how far they can be relied on. */
	readonly source: string;
}

export const CHAPTERS: readonly Chapter[] = [
	{
		id: 'chart',
		title: 'The chart',
		paragraphs: [
			'Both axes are logarithmic and have decades of the same length. A resistance is then a level line, the reactance 2πfL of an inductor rises at exactly 45°, and that of a capacitor, 1/(2πfC), falls at exactly 45°. A ruler and a set-square work, and every crossing can be read three ways: frequency, impedance, and the L and C that meet there.',
			'Through a point at f and |Z| pass L = |Z|/(2πf) and C = 1/(2πf|Z|). Where the lines of L and C cross lies their resonance, f0 = 1/(2π√(LC)), at the impedance √(L/C).',
			'C lines one decade apart lie one decade apart along either axis. The C scale at the right edge is the chart cut at the lowest switching frequency; below the chart the C lines go straight down into the benefit pane, so that its C axis is the chart’s own foot and larger values stand at the left.',
			'The line of a combination is not the higher of two straight lines: at a corner the true value is 3 dB off, at a resonance it is without bound. That is why bands and gains come from the network and not from the drawing.'
		],
		source: 'Identities; the layout is our own.'
	},
	{
		id: 'network',
		title: 'The network',
		paragraphs: [
			'The converter is a current source that feeds C and its damping branch Rd–Cd. L leads from there to the line side, where Cx lies across line and return, and beyond it stands the source. Everything is differential mode: with two networks in the loop their impedances are in series.',
			'A test network is 50 Ω across 50 µH (or 5 µH), with or without the series resistance of its inductor. It is no 50 Ω at a switching frequency: two of them with 5 Ω come to about 36 Ω at 65 kHz and 64 Ω at 145 kHz. Installed mains are an inductance between two limits with a resistance; a measured source is its curve.',
			'L may have a series resistance and a parallel capacitance, each capacitor a series resistance and inductance. A measured curve stands for a part where there is one, and is never carried beyond its ends in silence.'
		],
		source:
			'Nodal analysis. Element values of CISPR 16-1-2 networks are recalled, and agree with the recalled impedance tables to the printed digit.'
	},
	{
		id: 'benefit',
		title: 'The exact benefit',
		paragraphs: [
			'With Y_p the admittance at the line-side node without Cx, and Y_x that of Cx, the emission changes by 20·log10|1 + Y_x/Y_p| in dB: positive when Cx lowers it. The same ratio holds for the voltage at the node, the source’s current and the receiver’s reading, since nothing beyond the node is touched.',
			'Each number is the least over the stated range of frequency and of source inductance, with the other parts at their nominal values; the row says where it lies.',
			'At one frequency the worst Cx is C0 = −Im(Y_p)/ω. Every Cx below twice C0 makes that line worse than no Cx at all; damping limits how much, and does not move C0. This is why a second, lower window is shown but not recommended when a fundamental suffers in it.'
		],
		source: 'Nodal analysis, compared with an outside circuit simulator in the test run to 0.01 dB.'
	},
	{
		id: 'windows',
		title: 'Bands, windows and tolerance',
		paragraphs: [
			'A rule forbids open bands of real capacitance, in the worst case over the tolerances and ranges of all other parts. What mandatory and design rules leave together are the windows; their edges belong to them. An advisory rule is drawn and reported, and closes nothing.',
			'The part that is bought has a tolerance of its own: a nominal value passes when its whole tolerance lies inside, from C·(1 − t) to C·(1 + t). The nominal window is therefore narrower, and may be empty where the window is not. Printed edges are rounded inward.',
			'Two bands that touch leave one legal point. It is shown as such and never recommended. When nothing is left, the smallest set of rules that alone leaves nothing is named, with the least change of one value that would open a window again.',
			'Tolerance here is arithmetical worst case. Bias, temperature and ageing belong into the stated tolerance: a class 2 ceramic may lose half its value at rated voltage, a film capacitor a tenth over its life in damp heat (common practice).'
		],
		source: 'Interval algebra on a logarithmic axis, comparisons at one part in 10¹²; ties favour the window.'
	},
	{
		id: 'preferred',
		title: 'Preferred values',
		paragraphs: [
			'Candidates are the values of the chosen series inside nominal windows that are closed at both ends, ranked by their distance from the geometric middle of the window, where both margins are alike; then the coarser series, then the smaller value. The margin is stated to both edges.',
			'The series are E3 to E192. E3 to E24 are older than the formula and differ from it at 2.7 to 4.7 and at 8.2; in E192 9.20 stands for 9.19. E48 and E96 do not contain E24: 4.7 is not in E96. Film capacitors are in practice bought in E6.',
			'A value is written as on paper, 2.2 µF, or in the letter code of parts, 2u2 or 4n7. What could be meant in two ways, such as 1,000 or a bare 100, is asked about and never guessed.'
		],
		source:
			'IEC 60063 for the series (published list), IEC 60062 for the letter code (recalled for capacitors).'
	}
];
