// Package chart draws results against one quantity: the resistance of a section
// against its height, the utilisation of a member against its height or its
// loads, compression against bending. A chart is data first, found by asking the
// checker point by point, and then a picture, a plot of characters or a table.
package chart
