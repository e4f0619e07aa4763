/** The words of the screen, in the order of the alphabet. */
export const GLOSSARY: readonly { readonly term: string; readonly meaning: string }[] = [
	{ term: "Against spin", meaning: "Along the floor, opposite to the way it moves. In the layout file and in standards: retrograde." },
	{
		term: "Apparent gravity",
		meaning:
			"What a scale and a plumb line show someone who moves with the ring: the sum of centrifugal, Coriolis and Euler parts and minus the body’s own acceleration. Letter G.",
	},
	{
		term: "Axial",
		meaning: "Along the spin axis. +axial is the way the spin vector points: seen from its tip, the ring turns anticlockwise.",
	},
	{ term: "Basis", meaning: "What a limit rests on: a standard, a paper, common practice, or nothing that was confirmed (unverified)." },
	{ term: "Case", meaning: "One activity by one crew member in one phase." },
	{
		term: "Centrifugal",
		meaning: "The part of apparent gravity that spin alone makes: outward, spin rate squared times radius. Letter C.",
	},
	{ term: "Coaming", meaning: "The raised or reinforced edge of a hatch." },
	{
		term: "Coriolis",
		meaning:
			"The part that appears on whatever moves relative to the ring: sideways to its motion and to the axis, twice the spin rate times the speed. Letter K.",
	},
	{
		term: "Cross-coupled illusion (modelled)",
		meaning: "The false turning that the inner ear reports when the head turns about one axis while the room turns about another.",
	},
	{ term: "Derivation", meaning: "How a number came about: its formula, the values put in, its source and what was assumed." },
	{
		term: "Dropped-object zone",
		meaning: "Where on the decks things let go from a place come down first. Bounce and roll are not modelled.",
	},
	{ term: "Euler", meaning: "The part that appears while the spin rate changes: along the floor, against the change. Letter E." },
	{ term: "External", meaning: "The view from beside the person, in the ring." },
	{ term: "Eyepoint", meaning: "The view through the crew member’s eyes." },
	{
		term: "Finding",
		meaning: "One criterion held against one activity, element or deck: within, outside, or not assessed. Not assessed is never a pass.",
	},
	{ term: "Heading", meaning: "A direction on the floor: 0° with spin, 90° +axial, 180° against spin, 270° −axial." },
	{ term: "Inboard, up", meaning: "Toward the spin axis." },
	{ term: "Keep-out zone", meaning: "Floor where nobody should stand and nothing should be put." },
	{ term: "Lateral", meaning: "Sideways to someone on a ladder, neither toward it nor away from it." },
	{ term: "Level", meaning: "The size of apparent gravity over standard gravity, 9.80665 m/s². Unit g." },
	{ term: "Margin", meaning: "How far a value is from its limit, as a share of the limit; below zero it is outside." },
	{ term: "Outboard, down", meaning: "Away from the spin axis." },
	{ term: "Phase", meaning: "A spin rate with a name, such as nominal." },
	{ term: "Ring angle", meaning: "Where around the ring, positive the way the floor moves." },
	{ term: "Shall, should, information", meaning: "How binding a criterion is. They are counted apart and never summed." },
	{ term: "Tilt of the apparent vertical", meaning: "The angle between apparent gravity and the deck’s own down: where a plumb bob goes." },
	{ term: "Toward, away from the ladder", meaning: "Pressed to the rungs, or off them." },
	{
		term: "Unverified",
		meaning: "A limit that nobody checked against its source. Confirm it before relying on it; it is left out of every count.",
	},
	{ term: "With spin", meaning: "Along the floor, the way it moves. In the layout file and in standards: prograde." },
];
