/** What curator and contributor write to each other before a decision; `reply` is the curator's last word, where there is one. */
export interface Exchange {
  question: string;
  answer: string;
  reply?: string;
}

export const exchanges: readonly Exchange[] = [
  { question: 'Were the neighbours of q3 driven while the sheet was run?', answer: 'No. They were left in |0⟩ and not driven. We shall say so in the notes from now on.' },
  { question: 'This is your first dataset. Please tell us who had access to the device during the run, and whether anybody from outside your company was there.', answer: 'Two of our own people, in our laboratory. Nobody from outside.' },
  { question: 'The run took more than an hour. Was the atom loaded again in between?', answer: 'Yes, after every block, always by the same procedure.' },
  {
    question: 'The counts do not fit the estimate, and the first and the last blocks stand out. Do you know of a drift of the drive?',
    answer: 'Yes. We cannot calibrate within a run yet. We should rather see the figures as they are than none.', reply: 'Then the note stays on the page: the figures are an average over a drift.',
  },
  { question: 'With 500 shots you are at the floor of this class, and the intervals are wide. Is that meant?', answer: 'Yes. The array gives 40 shots a second. A longer run is planned.' },
  { question: 'The gate errors are far beyond those for which the intervals were tested, and the checks say what follows from that. Do you wish to publish the dataset all the same?', answer: 'Yes. The device is young, and later runs should have something to be compared with.' },
  { question: 'The misfit is high. Do you see population outside of the two levels?', answer: 'In our own tests about one per cent leaves them with each gate. It is part of the counts and is read as 1.' },
  { question: 'Did anything besides the firmware change since your run of February?', answer: 'The wiring, in March. Nothing since then.', reply: 'Thank you; that answers it.' },
  { question: 'Is t a pulse on this device, or a change of frame?', answer: 'A pulse, as long as the others.' },
  { question: 'Were the other qubits idle while the pair was measured?', answer: 'Yes, all of them in |0⟩ and not driven.' },
  { question: 'The circuits are of your own design. The dataset is estimated and published, but it is never ranked. Is that clear?', answer: 'It is. We had these sequences before we knew of run sheets.' },
  { question: 'Was the wiring of this run the same as that of December 2025?', answer: 'It was; only the firmware is newer.' },
  { question: 'Was each pair run with the third ion at rest, or were the circuits of several patches run side by side?', answer: 'One patch after another, and the ions outside it at rest in |0⟩. The circuits over all three came last.' },
];
