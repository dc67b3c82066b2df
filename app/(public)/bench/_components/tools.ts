/** The bench's pages in the order of their links: the word of the link, and the question that the page answers. */
export const tools = [
  {
    path: '/bench/emc',
    name: 'EMC',
    question: 'Where does wood end in this air, and what air would hold it where you want it?',
  },
  {
    path: '/bench/fit',
    name: 'Lid fit',
    question: 'Does the lid still turn after the wood has moved, and may the joint be cut today?',
  },
  {
    path: '/bench/time-out',
    name: 'Time out',
    question: 'How long may a finished box stay in other air before its lid may bind?',
  },
  {
    path: '/bench/ready',
    name: 'Ready',
    question: 'From its weighings, is a roughed blank ready, and if not, about when?',
  },
  {
    path: '/bench/shop',
    name: 'Shop',
    question: 'How warm or how dry would the shop have to be to match the house tonight?',
  },
  {
    path: '/bench/salts',
    name: 'Salts',
    question: 'What should a sensor read over a wet salt, and so, how far out is it?',
  },
] as const
