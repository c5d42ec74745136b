let audio: AudioContext | undefined;

/** To be called in a press: browsers let a page sound only after one. */
export function readyToRing(): void {
  if (typeof AudioContext === 'undefined') return;
  audio ??= new AudioContext();
  void audio.resume();
}

const [pitchHz, beeps, beepS] = [880, 3, 0.25];

/** Three short tones, and a shake where the device can. */
export function ring(): void {
  if (typeof navigator !== 'undefined' && 'vibrate' in navigator)
    navigator.vibrate([300, 150, 300, 150, 300]);
  if (audio?.state !== 'running') return;
  for (let index = 0; index < beeps; index += 1) {
    const tone = audio.createOscillator();
    tone.frequency.value = pitchHz;
    tone.connect(audio.destination);
    const at = audio.currentTime + 2 * index * beepS;
    tone.start(at);
    tone.stop(at + beepS);
  }
}
