import { fitted, shrinkPhoto } from './shrink-photo';

describe('shrinking a photo', () => {
  it.each([
    [4000, 3000, 1600, 1200],
    [3000, 4000, 1200, 1600],
    [800, 600, 800, 600],
    [1601, 1, 1600, 1],
  ])('brings %d × %d to %d × %d', (width, height, toWidth, toHeight) => {
    expect(fitted(width, height, 1600)).toEqual({ width: toWidth, height: toHeight });
  });

  it('sends what cannot be drawn as it is', async () => {
    const file = new File(['not a picture'], 'note.jpg', { type: 'image/jpeg' });
    expect(await shrinkPhoto(file)).toBe(file);
  });
});
