// What the form tells the page: an estimate has been answered, or a call has failed. Both events bubble.
const kept = document.getElementById('kept');

document.addEventListener('tarebeam-estimate', (event) => {
  say(`Your latest reference: ${event.detail.estimate.id} (edition ${event.detail.estimate.edition}).`);
});

document.addEventListener('tarebeam-error', (event) => {
  say(`No estimate this time (${event.detail.code}). We can also be asked in person.`);
});

function say(text) {
  kept.hidden = false;
  kept.textContent = text;
}
