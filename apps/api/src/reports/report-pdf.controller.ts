import { Controller, Get, Param, Req, Res, StreamableFile } from '@nestjs/common';
import { ApiOkResponse, ApiProduces, ApiTags } from '@nestjs/swagger';
import type { Response } from 'express';
import { ProjectAccess, RequirePermission } from '../access/require-permission.decorator.js';
import type { AppRequest, ProjectAccess as Access } from '../common/request.js';
import { present } from '../storage/missing-object.js';
import { ReportPdfService } from './report-pdf.service.js';
import { ReportsService } from './reports.service.js';

@ApiTags('reports')
@Controller('reports/:id/pdf')
export class ReportPdfController {
  constructor(
    private readonly pdfs: ReportPdfService,
    private readonly reports: ReportsService,
  ) {}

  @Get()
  @RequirePermission('report.read', { resource: 'report' })
  @ApiProduces('application/pdf')
  @ApiOkResponse({
    description: 'An issued report byte for byte, its ETag being the SHA-256; any other marked DRAFT',
    schema: { type: 'string', format: 'binary' },
  })
  async read(
    @Req() request: AppRequest,
    @Res({ passthrough: true }) response: Response,
    @ProjectAccess() { role }: Access,
    @Param('id') id: string,
  ): Promise<StreamableFile | undefined> {
    await this.reports.requireVisible(id, role);
    const { bytes, fileName, sha256 } = await present(this.pdfs.get(id));
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
      type: 'application/pdf',
      disposition: `inline; filename="${fileName}"`,
      length: bytes.length,
    });
  }
}
