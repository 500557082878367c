import { granuleFrames } from './block';
import { Channel } from './channel';
import { blockHighest, blockLowest, highest, lowest } from './levels';
import { columns, framesPerColumn } from './parameters';

/** The picture: lowest and highest sample of every column, kept as f32 pairs. */

export function drawGranules<T extends number>(channel: Channel, frames: i32): void {
  if (framesPerColumn < granuleFrames) {
    for (let i = 0; i < frames; i++) {
      const x = <f64>load<T>(channel.samples + <usize>i * sizeof<T>());
      draw(channel, x, x, 1);
    }
    return;
  }
  if (channel.columnFrames + frames < framesPerColumn) {
    draw(channel, blockLowest, blockHighest, frames);
    return;
  }
  for (let granule = 0; granule * granuleFrames < frames; granule++) {
    const at = (<usize>granule) << 3;
    const length = min(granuleFrames, frames - granule * granuleFrames);
    draw(channel, load<f64>(lowest + at), load<f64>(highest + at), length);
  }
}

function draw(channel: Channel, low: f64, high: f64, frames: i32): void {
  if (channel.column >= columns) return;
  const at = channel.overview + ((<usize>channel.column) << 3);
  if (channel.columnFrames == 0) {
    store<f32>(at, <f32>low);
    store<f32>(at, <f32>high, 4);
  } else {
    store<f32>(at, min(load<f32>(at), <f32>low));
    store<f32>(at, max(load<f32>(at, 4), <f32>high), 4);
  }
  channel.columnFrames += frames;
  if (channel.columnFrames >= framesPerColumn) {
    channel.column++;
    channel.columnFrames = 0;
  }
}
