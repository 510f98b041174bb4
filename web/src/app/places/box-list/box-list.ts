import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import type { Box } from '@shared/contract';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';

/** The box sizes of the circle, the smallest first. An admin opens one to change it. */
@Component({
  selector: 'db-box-list',
  imports: [EmptyState, MatButton, MatIcon, MatProgressBar, NextAction, PageHeader, ProblemNote, RouterLink],
  templateUrl: './box-list.html',
  styleUrl: './box-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoxList {
  private readonly session = inject(SessionStore);

  protected readonly canEdit = computed(() => this.session.has('admin'));
  protected readonly listed = httpResource<Box[]>(() => '/api/boxes');
  protected readonly problem = computed(() => errorText(this.listed.error()));
  protected readonly boxes = computed(() =>
    this.listed.hasValue() ? this.listed.value().toSorted((a, b) => a.volumeL - b.volumeL) : null,
  );
}
