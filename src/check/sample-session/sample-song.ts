/** The song the sample session is made of; invented. */
export const sampleSong = { artist: 'Velvet Tramline', title: 'Salt on the Windows', bpm: 112 };
