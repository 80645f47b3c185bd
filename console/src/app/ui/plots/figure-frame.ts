import { NgTemplateOutlet } from '@angular/common';
import { Component, Directive, TemplateRef, contentChild, inject, input, signal } from '@angular/core';

/** Marks the drawing of a `tb-figure-frame`: `<ng-template tbPlot>`. */
@Directive({ selector: 'ng-template[tbPlot]' })
export class PlotTemplate {
  readonly template = inject<TemplateRef<unknown>>(TemplateRef);
}

/** Marks the same figures as a table: `<ng-template tbPlotTable>`. */
@Directive({ selector: 'ng-template[tbPlotTable]' })
export class PlotTableTemplate {
  readonly template = inject<TemplateRef<unknown>>(TemplateRef);
}

/** A plot with its heading, a sentence on what it shows, and a switch that shows the figures as a table instead. */
@Component({
  selector: 'tb-figure-frame',
  imports: [NgTemplateOutlet],
  templateUrl: './figure-frame.html',
  styleUrl: './figure-frame.scss',
})
export class FigureFrame {
  readonly heading = input.required<string>();
  /** The finding in a sentence, or how to read the plot. */
  readonly caption = input<string>();

  protected readonly plot = contentChild.required(PlotTemplate);
  protected readonly table = contentChild.required(PlotTableTemplate);
  protected readonly asTable = signal(false);

  protected switchView(): void {
    this.asTable.update((asTable) => !asTable);
  }
}
