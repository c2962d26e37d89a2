import { Controller, Get, Param, Req, Res, StreamableFile } from '@nestjs/common';
import { ApiOkResponse, ApiProduces, ApiTags } from '@nestjs/swagger';
import { createZodDto } from 'nestjs-zod';
import { reportTwinSchema } from '@overtally/contracts';
import type { Response } from 'express';
import { ProjectAccess, RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import type { AppRequest, ProjectAccess as Access } from '../common/request.js';
import { goneSignal } from '../common/gone-signal.js';
import { present } from '../storage/missing-object.js';
import type { ReportForm } from './rendering/report-task.js';
import { ReportFiles } from './report-files.service.js';
import { ReportsService } from './reports.service.js';

class ReportTwinDto extends createZodDto(reportTwinSchema) {}

const mediaTypes: Record<ReportForm, string> = {
  pdf: 'application/pdf',
  json: 'application/json',
  csv: 'text/csv; charset=utf-8',
};

const asIssued = 'An issued report byte for byte, its ETag being the SHA-256';

@ApiTags('reports')
@Controller('reports/:id')
export class ReportFilesController {
  constructor(
    private readonly files: ReportFiles,
    private readonly reports: ReportsService,
  ) {}

  @Get('pdf')
  @RequirePermission('report.read', { resource: 'report' })
  @ApiProduces('application/pdf')
  @ApiOkResponse({
    description: `${asIssued}; any other marked DRAFT`,
    schema: { type: 'string', format: 'binary' },
  })
  pdf(
    @Req() request: AppRequest,
    @Res({ passthrough: true }) response: Response,
    @ProjectAccess() { role }: Access,
    @Param('id') id: string,
  ) {
    return this.send('pdf', { request, response, role, id });
  }

  @Get('json')
  @RequirePermission('report.read', { resource: 'report' })
  @ApiOkResponse({
    description: `The report as data, with the numbers of its PDF in full. ${asIssued}`,
    type: ReportTwinDto.Output,
  })
  @ApiProblem(404, 'There is no such report, or it was issued before reports were kept as data')
  json(
    @Req() request: AppRequest,
    @Res({ passthrough: true }) response: Response,
    @ProjectAccess() { role }: Access,
    @Param('id') id: string,
  ) {
    return this.send('json', { request, response, role, id });
  }

  @Get('csv')
  @RequirePermission('report.read', { resource: 'report' })
  @ApiProduces('text/csv')
  @ApiOkResponse({
    description: `One row per order and total of all sections, with the numbers of the PDF in full. ${asIssued}`,
    schema: { type: 'string' },
  })
  @ApiProblem(404, 'There is no such report, or it was issued before reports were kept as data')
  csv(
    @Req() request: AppRequest,
    @Res({ passthrough: true }) response: Response,
    @ProjectAccess() { role }: Access,
    @Param('id') id: string,
  ) {
    return this.send('csv', { request, response, role, id });
  }

  private async send(
    form: ReportForm,
    {
      request,
      response,
      role,
      id,
    }: { request: AppRequest; response: Response; id: string } & Pick<Access, 'role'>,
  ): Promise<StreamableFile | undefined> {
    await this.reports.requireVisible(id, role);
    const { bytes, fileName, sha256 } = await present(this.files.get(id, form, goneSignal(response)));
    if (sha256 === null) {
      response.setHeader('Cache-Control', 'no-store');
    } else {
      response.setHeader('ETag', `"${sha256}"`);
      response.setHeader('Cache-Control', 'private, no-cache');
      if (request.fresh) {
        response.status(304);
        return undefined;
      }
    }
    return new StreamableFile(bytes, {
      type: mediaTypes[form],
      disposition: `${form === 'pdf' ? 'inline' : 'attachment'}; filename="${fileName}"`,
      length: bytes.length,
    });
  }
}
