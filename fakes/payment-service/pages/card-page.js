// Writes the chosen test card into its field. The page does the same work without it.
/* global document */
const number = document.querySelector('#number');

for (const choice of document.querySelectorAll('input[name="card"]')) {
  const fillIn = () => {
    if (choice.checked) number.value = choice.dataset.number;
  };
  choice.addEventListener('change', fillIn);
  if (number.value === '') fillIn();
}
