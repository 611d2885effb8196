// Package rating owns cable physics: Resolve document + catalogue → section in SI and the problems of substance; resistance and losses →
// heat problem → fixed point → Result; each number says which rule or row made it. It must not know pixels or Fyne.
package rating
