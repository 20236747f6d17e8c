// The built page starts, without an error, from its own files alone.
import { expect, test } from './fixtures';

test('the page starts and says its name', async ({ page, expectAccessible }) => {
  await page.goto('/');
  await expect(page).toHaveTitle(/Levelwright/);
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  await expectAccessible();
});
