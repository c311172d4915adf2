/** The nine questions of the tree in words, as the forest plots ask them. */
export const questionText: Record<`q${1 | 2 | 3 | 4 | 5 | 6 | 7 | 8 | 9}`, string> = {
	q1: 'Is there more than one canal anywhere in the root?',
	q2: 'Of roots with more than one canal: does it open with two or more orifices?',
	q3: 'Of these: three or more orifices?',
	q4: 'Of roots with two orifices: does the number of canals ever step down (do they meet)?',
	q5: 'Of two canals that meet: does the root end in two or more exits?',
	q6: 'Of roots with one orifice and more than one canal: does it end in one exit?',
	q7: 'Of those that end in several exits: does the number of canals ever step down?',
	q8: 'Of roots with three or more orifices: does the number of canals ever step down?',
	q9: 'Of these that meet: does the root end in one exit?'
};
